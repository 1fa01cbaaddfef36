import {
  ElementError,
  solvedSectionOf,
  synthesize,
  takeInSolved,
  type SolvedSection,
} from '@tollgate/elements';
import type { CrossSection, Synthesis } from '@tollgate/contracts';
import { answerOf } from './desk-answer';
import type { DeskResult, DeskTask, SectionTask, SynthesisTask } from './desk-task';

/** Answers one question of the cross-section desk in a worker thread, which keeps what it has solved. */
export default function answer(task: DeskTask): DeskResult<CrossSection | Synthesis> {
  try {
    return task.kind === 'section' ? sectionAnswer(task) : synthesisAnswer(task);
  } catch (error) {
    if (error instanceof ElementError) return { ok: false, problems: [error.problem] };
    throw error;
  }
}

interface Answer<Reply> {
  readonly ok: true;
  readonly reply: Reply;
  readonly solved: SolvedSection;
}

function sectionAnswer({ stackup, input, sensitivities, known }: SectionTask): Answer<CrossSection> {
  if (known) takeInSolved(known);
  return {
    ok: true,
    reply: answerOf(stackup, input, sensitivities),
    solved: solvedSectionOf(stackup, input),
  };
}

/** Where the search for a width starts; it does not matter to the result. */
const startWidthM = 100e-6;

function synthesisAnswer({ stackup, wanted }: SynthesisTask): Answer<Synthesis> {
  const { layer, planes, frequencyHz, targetOhm, mode, widthM, gapM } = wanted;
  const found = mode === 'differential' && gapM === undefined ? 'gap' : 'width';
  const pair = mode === 'differential' ? { gapM: gapM ?? startWidthM } : {};
  const start = { layer, planes, widthM: widthM ?? startWidthM, ...pair };
  const vary = found === 'gap' ? 'gapM' : 'widthM';
  const lengthM = synthesize(stackup, start, { targetOhm, mode, vary });
  const input = { ...start, [vary]: lengthM, frequencyHz };
  const section = answerOf(stackup, input, false);
  const reachedOhm = section.figures.differentialOhm ?? section.figures.z0Ohm!;
  const reply = { widthM: input.widthM, gapM: input.gapM ?? null, found, targetOhm, reachedOhm, section };
  return { ok: true, reply: reply as Synthesis, solved: solvedSectionOf(stackup, input) };
}
