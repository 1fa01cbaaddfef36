/** Steps of a whole turn in `turnTable`. */
const turnSteps = 256;

/** Cosine and sine of k/256 of a turn at [2 k] and [2 k + 1], with the zeros exact. */
export const turnTable = new Float64Array(turnSteps * 2);
for (let k = 0; k < turnSteps; k++) {
  const inQuarter = k % 64;
  // Up to half a right angle both are at their most exact.
  const near = (Math.min(inQuarter, 64 - inQuarter) * 2 * Math.PI) / turnSteps;
  const cos = inQuarter <= 32 ? Math.cos(near) : Math.sin(near);
  const sin = inQuarter <= 32 ? Math.sin(near) : Math.cos(near);
  const quarter = Math.floor(k / 64);
  turnTable[2 * k] = [cos, -sin, -cos, sin][quarter]!;
  turnTable[2 * k + 1] = [sin, cos, -sin, -cos][quarter]!;
}

/** e^(-k/32). */
export const decayTable = Float64Array.from({ length: 1024 }, (_unused, k) => Math.exp(-k / 32));
