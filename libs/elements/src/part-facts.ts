import type { PartFacts } from '@tollgate/contracts';
import {
  assessQuality,
  assessSampling,
  type Network,
  type NetworkQuality,
  type PassivityQuality,
  widestPhaseStepDeg,
} from '@tollgate/network';
import type { ElementPart } from './types';

/** What can be said of a file by itself, worked out once a file. */
export type FileFacts = Pick<PartFacts, 'fileName' | 'sha256' | 'ports' | 'points' | 'bandHz' | 'quality'>;

/** Above this, grading takes longer than a check. */
const mostGradedPorts = 8;

const known = new WeakMap<Network, FileFacts>();

export function factsOfFile({ file, sha256 }: ElementPart): FileFacts {
  const { network, fileName } = file;
  const found = known.get(network);
  if (found && found.sha256 === sha256) return found;
  const { frequenciesHz, ports } = network;
  const facts: FileFacts = {
    fileName,
    sha256,
    ports,
    points: frequenciesHz.length,
    bandHz: [frequenciesHz[0]!, frequenciesHz[frequenciesHz.length - 1]!],
    ...(ports <= mostGradedPorts ? { quality: gradesOf(assessQuality(network)) } : {}),
  };
  known.set(network, facts);
  return facts;
}

function gradesOf({ passivity, reciprocity, causality }: NetworkQuality): NonNullable<PartFacts['quality']> {
  const told = ({ percent, grade, failsHz }: Pick<PassivityQuality, 'percent' | 'grade' | 'failsHz'>) => ({
    percent,
    grade,
    failsHz: failsHz.map(([from, to]): [number, number] => [from, to]),
  });
  return {
    passivity: told(passivity),
    reciprocity: reciprocity && told(reciprocity),
    causality: causality && told(causality),
  };
}

/** How densely the used ports are sampled: `network` is the part as it stands in the channel. */
export function samplingOf(network: Network): Pick<PartFacts, 'gapsHz' | 'reachesDc' | 'phaseStepDeg'> {
  const legs = network.ports / 2;
  const through = Array.from({ length: legs }, (_, leg): [number, number] => [legs + leg, leg]);
  const { gapsHz, reachesDc, phaseStep } = assessSampling(network, through);
  return { gapsHz: gapsHz.map(([from, to]) => [from, to]), reachesDc, phaseStepDeg: phaseStep.deg };
}

/** What a person should know of a file before trusting what is read from it. */
export function partWarnings(facts: Omit<PartFacts, 'element'>): string[] {
  const { fileName, quality, gapsHz, phaseStepDeg } = facts;
  const words: string[] = [];
  const named = { passivity: 'passive', reciprocity: 'reciprocal', causality: 'causal' } as const;
  for (const metric of ['passivity', 'reciprocity', 'causality'] as const) {
    const grade = quality?.[metric];
    if (!grade || (grade.grade === 'good' && (metric !== 'passivity' || grade.failsHz.length === 0)))
      continue;
    const where = grade.failsHz.length ? `; it is not ${rangeWords(grade.failsHz)}` : '';
    words.push(
      `${fileName} is graded ${grade.grade} (${grade.percent.toFixed(2)} %) as ${named[metric]}${where}.`,
    );
  }
  if (gapsHz.length)
    words.push(`${fileName} has no points ${rangeWords(gapsHz)}: what is read there is a guess.`);
  if (phaseStepDeg > widestPhaseStepDeg) {
    words.push(
      `${fileName} turns by up to ${phaseStepDeg.toFixed(0)} degrees between two points; above ${widestPhaseStepDeg} degrees what is read between them is not reliable.`,
    );
  }
  return words;
}

const shownRanges = 3;

function rangeWords(ranges: readonly (readonly [number, number])[]): string {
  const shown = ranges.slice(0, shownRanges).map(([from, to]) => {
    return from === to ? `at ${gigahertz(from)}` : `from ${gigahertz(from)} to ${gigahertz(to)}`;
  });
  const more = ranges.length - shown.length;
  return shown.join(', ') + (more > 0 ? ` and in ${more} more ranges` : '');
}

function gigahertz(hz: number): string {
  return `${Number((hz / 1e9).toPrecision(4))} GHz`;
}
