import { LineError, solveLine, type CrossSection, type Dielectric, type SolvedLine } from '@tollgate/lines';
import { sameMaterial } from './material';
import type { Sheet, TraceSection } from './section';

/**
 * The published closed form of a trace, over frequency.
 * @throws LineError where no listed form covers the section
 */
export function estimateLine(section: TraceSection, frequenciesHz: Float64Array): SolvedLine {
  const { widthM, gapM, thicknessM, etchAngleDeg, foot, traceAtM } = section;
  if (section.mask) {
    throw uncovered('A solder mask has no trustworthy closed form.');
  }
  const { below, own, above } = sidesOf(section);
  const totalM = section.sheets.reduce((sum, sheet) => sum + sheet.thicknessM, 0);
  const aboveM = totalM - traceAtM - thicknessM;
  const lower = oneMaterial(below, 'below');
  const cross: CrossSection = { widthM, gapM, thicknessM, etchAngleDeg, foot, belowM: traceAtM };
  if (!section.planeAbove) {
    if (own.length + above.length > 0)
      throw uncovered('A trace inside a dielectric under air has no listed closed form.');
    return solveLine({ section: cross, conductor: section.conductor, below: lower }, frequenciesHz);
  }
  return solveLine(
    {
      section: { ...cross, aboveM },
      conductor: section.conductor,
      below: lower,
      above: oneMaterial(above, 'above'),
    },
    frequenciesHz,
  );
}

/** Sheets below the trace, beside it and above it. */
function sidesOf({ sheets, traceAtM, thicknessM }: TraceSection): Record<'below' | 'own' | 'above', Sheet[]> {
  const sides: Record<'below' | 'own' | 'above', Sheet[]> = { below: [], own: [], above: [] };
  const rounding = 1e-12;
  let atM = 0;
  for (const sheet of sheets) {
    const middleM = atM + sheet.thicknessM / 2;
    atM += sheet.thicknessM;
    if (middleM < traceAtM - rounding) sides.below.push(sheet);
    else if (middleM < traceAtM + thicknessM) sides.own.push(sheet);
    else sides.above.push(sheet);
  }
  return sides;
}

function oneMaterial(sheets: readonly Sheet[], side: 'below' | 'above'): Dielectric {
  const [first, ...rest] = sheets;
  if (!first) throw uncovered(`No dielectric lies ${side} the trace.`);
  const same = rest.every(({ material }) => sameMaterial(material, first.material));
  if (!same) throw uncovered(`Different dielectrics ${side} the trace have no listed closed form.`);
  return first.material;
}

function uncovered(reason: string): LineError {
  return new LineError(reason, 'The field solution covers it.', 'layer');
}
