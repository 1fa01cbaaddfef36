import type { TraceSection } from '../trace/section';

/** Above this Dk a laminate is a ceramic; thinner than this a dielectric is a coating; common practice. */
const unusualDk = 10;
const thinM = 10e-6;
/** Over this a loss tangent is a lossy FR-4 no more. */
const unusualDf = 0.05;

/** Values that are possible, and more likely slips of the pen: told, not refused. */
export function doubtsOf({ sheets, mask, thicknessM, traceAtM, widthM }: TraceSection): string[] {
  const doubts: string[] = [];
  for (const { layer, material, thicknessM: heightM } of [...sheets, ...(mask ? [mask] : [])]) {
    if (material.dk >= unusualDk)
      doubts.push(`Dk ${material.dk} of ${layer} is that of a ceramic, not of a laminate.`);
    if (material.df > unusualDf) doubts.push(`Df ${material.df} of ${layer} is unusually high.`);
    if (material.df === 0 && material.dispersion === 'wideband-debye') {
      doubts.push(`${layer} has no loss: a causal model then keeps Dk constant.`);
    }
    if (heightM < thinM) doubts.push(`${layer} is only ${micrometres(heightM)} thick.`);
  }
  if (thicknessM > 0.2e-3) doubts.push(`Copper of ${micrometres(thicknessM)} is heavier than 5 oz.`);
  if (widthM > 50 * traceAtM) doubts.push('The trace is wider than 50 times its height: is it a plane?');
  return [...new Set(doubts)];
}

function micrometres(lengthM: number): string {
  return `${Number((lengthM * 1e6).toPrecision(3))} µm`;
}
