import type {
  CrossSection,
  CrossSectionInput,
  Layer,
  LineModeFigures,
  SectionFigures,
  Sensitivity,
  Stackup,
} from '@tollgate/contracts';
import {
  crossSectionOf,
  ElementError,
  sensitivitiesOf,
  type CrossSectionFacts,
  type ModesFacts,
  type Sensitivity as Answering,
} from '@tollgate/elements';
import { drawingOf } from './desk-drawing';

/**
 * What the desk says of a section, as the screen takes it.
 * @throws ElementError with the field of the request at fault
 */
export function answerOf(
  stackup: Stackup,
  input: CrossSectionInput,
  withSensitivities: boolean,
): CrossSection {
  const facts = crossSectionOf(stackup, input, input.frequencyHz);
  const figures = figuresOf(facts.modes, facts.source);
  const { closedForm } = facts;
  const closed = 'refused' in closedForm ? null : figuresOf(closedForm.modes, closedForm.source);
  const cautions = [...facts.cautions, ...('refused' in closedForm ? [] : closedForm.cautions)];
  const smooth = withoutRoughness(stackup, input.layer);
  if (smooth)
    cautions.push(
      `${input.layer} has no roughness: smooth copper is assumed, and the copper's loss is the least it can be.`,
    );
  const told = withSensitivities ? sensitivities(stackup, input) : { items: [], cautions: [] };
  return {
    kind: kindOf(facts),
    pair: input.gapM !== undefined,
    standing: smooth ? 'assumed' : 'solved',
    frequencyHz: input.frequencyHz,
    figures,
    closedForm: closed,
    closedFormReason: 'refused' in closedForm ? closedForm.refused : null,
    differencePercent: closed ? (controlledOhm(closed) / controlledOhm(figures) - 1) * 100 : null,
    solver: facts.solver,
    planes: facts.planes,
    drawing: drawingOf(facts, stackup),
    cautions: [...new Set([...cautions, ...told.cautions])],
    sensitivities: told.items,
  };
}

/** The impedance that is held to a value: of a trace its own, of a pair the differential one. */
export function controlledOhm({ z0Ohm, differentialOhm }: SectionFigures): number {
  return differentialOhm ?? z0Ohm ?? Number.NaN;
}

function figuresOf(facts: ModesFacts, source: string): SectionFigures {
  const modes = (['single', 'even', 'odd'] as const).flatMap((mode): LineModeFigures[] => {
    const figures = facts[mode];
    return figures ? [{ mode, ...figures }] : [];
  });
  const { single, even, odd } = facts;
  return {
    modes,
    z0Ohm: single?.z0Ohm ?? null,
    differentialOhm: odd ? 2 * odd.z0Ohm : null,
    commonOhm: even ? even.z0Ohm / 2 : null,
    source,
  };
}

function kindOf({ drawing }: CrossSectionFacts): CrossSection['kind'] {
  if (drawing.planeAboveAtM !== undefined) return 'stripline';
  if (drawing.mask) return 'coated-microstrip';
  const topM = drawing.sheets.at(-1)?.toM ?? 0;
  const traceAtM = drawing.traces[0]![0]![1];
  return topM > traceAtM * (1 + 1e-9) ? 'embedded-microstrip' : 'microstrip';
}

function withoutRoughness(stackup: Stackup, layer: string): boolean {
  const copper = stackup.layers?.find(({ name }) => name === layer);
  return copper?.kind === 'copper' && copper.roughness === undefined;
}

function sensitivities(
  stackup: Stackup,
  input: CrossSectionInput,
): { items: Sensitivity[]; cautions: string[] } {
  const mode = input.gapM === undefined ? 'single' : 'differential';
  try {
    return { items: sensitivitiesOf(stackup, input, mode).map((each) => told(each, stackup)), cautions: [] };
  } catch (error) {
    if (!(error instanceof ElementError)) throw error;
    // A value at the edge of what there is cannot be stepped over it; the section itself is solved.
    return { items: [], cautions: [`Sensitivities are left out: ${error.problem.message}`] };
  }
}

function told({ of, layer, value, ohmPerUnit }: Answering, stackup: Stackup): Sensitivity {
  const quantity = of === 'copper thickness' ? 'thickness' : of;
  const tolerance = toleranceOf(
    stackup.layers?.find(({ name }) => name === layer),
    quantity,
  );
  return {
    of: quantity,
    layer,
    value,
    ohmPerUnit,
    ohmPerPercent: (ohmPerUnit * value) / 100,
    toleranceOhm: tolerance === undefined ? null : Math.abs(ohmPerUnit * tolerance),
  };
}

function toleranceOf(layer: Layer | undefined, of: Sensitivity['of']): number | undefined {
  if (of === 'height' || of === 'thickness') return layer?.thicknessToleranceM;
  if (layer?.kind === 'copper') return of === 'width' ? layer.widthToleranceM : undefined;
  return of === 'dk' ? layer?.dkTolerance : undefined;
}
