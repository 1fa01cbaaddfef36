import type { Mask, MaskPiece } from './mask';

/** Samples of a formula's outline, spread evenly once over frequency and once over its logarithm. */
const samples = 48;

/**
 * A limit as polylines of [Hz, value] for drawing: one a continuous stretch, a step as two points of one frequency, gaps
 * between stretches. A piece that is straight in frequency has its two ends only.
 */
export function outlineOf(mask: Mask): [number, number][][] {
  const lines: [number, number][][] = [];
  for (const piece of mask.pieces) {
    const points = frequenciesOf(piece).map((f): [number, number] => [f, piece.valueAt(f)]);
    const line = lines.at(-1);
    if (!line || line.at(-1)![0] !== piece.fromHz) lines.push(points);
    else line.push(...(line.at(-1)![1] === points[0]![1] ? points.slice(1) : points));
  }
  return lines;
}

function frequenciesOf({ fromHz, toHz, valueAt }: MaskPiece): number[] {
  if (fromHz === toHz) return [fromHz];
  const spread = toHz - fromHz;
  const straight = [0.13, 0.5, 0.83].every((share) => {
    const chord = valueAt(fromHz) + (valueAt(toHz) - valueAt(fromHz)) * share;
    return Math.abs(valueAt(fromHz + spread * share) - chord) < 1e-9;
  });
  if (straight) return [fromHz, toHz];
  const start = fromHz > 0 ? fromHz : spread * 1e-4;
  const inside = new Set<number>();
  for (let k = 1; k < samples; k++) {
    inside.add(fromHz + (spread * k) / samples);
    inside.add(start * (toHz / start) ** (k / samples));
  }
  const between = [...inside].filter((f) => f > fromHz && f < toHz).sort((a, b) => a - b);
  return [fromHz, ...between, toHz];
}
