import { parseChannelFile, type ChannelElement, type Stackup } from '@tollgate/contracts';
import { buildElement, elementProblems } from '../index';

const layers = [
  { kind: 'copper', name: 'L1', role: 'signal', thicknessM: 40e-6 },
  {
    ...{
      kind: 'dielectric',
      name: 'D1',
      thicknessM: 100e-6,
      dk: 4,
      df: 0.01,
      atHz: 1e9,
      dispersion: 'constant',
    },
  },
  { kind: 'copper', name: 'L2', role: 'plane', thicknessM: 17e-6 },
];
const body = { capacitanceF: 1e-7, seriesInductanceH: 3e-10, seriesResistanceOhm: 0.02, padCapacitanceF: 0 };

function read(...elements: object[]): { elements: ChannelElement[]; stackup: Stackup } {
  const parsed = parseChannelFile({
    ...{
      format: 'tollgate.channel/1',
      name: 'Pads',
      signaling: 'single-ended',
      referenceOhm: 50,
      limits: [],
    },
    stackup: { layers },
    elements,
  });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.problems));
  return { elements: parsed.channel.elements, stackup: parsed.channel.stackup! };
}

describe("a capacitor's pads given as copper", () => {
  it('are the short wide traces before and behind it', () => {
    const pads = { layer: 'L1', widthM: 0.5e-3, lengthM: 0.6e-3 };
    const pad = { kind: 'trace', ...pads };
    const { elements, stackup } = read(
      { kind: 'capacitor', ...body, pads },
      { kind: 'capacitor', ...body },
      pad,
    );
    const context = { signaling: 'single-ended' as const, jointOhm: 50, stackup, parts: new Map() };
    const f = Float64Array.of(0, 1e9, 2e10);
    const [whole, bare, copper] = elements.map((element) => buildElement(element, f, context).s);
    for (const point of [1, 2]) {
      const at = (s: Float64Array, entry: number) =>
        [s[point * 8 + entry]!, s[point * 8 + entry + 1]!] as const;
      // S21 of three two-ports in a row by hand: d1 d2 with the middle seen through the first joint.
      const mul = ([a, b]: readonly number[], [c, d]: readonly number[]) => [
        a! * c! - b! * d!,
        a! * d! + b! * c!,
      ];
      const sub = ([a, b]: readonly number[], [c, d]: readonly number[]) => [a! - c!, b! - d!];
      const div = (x: readonly number[], [c, d]: readonly number[]) => {
        const size = c! * c! + d! * d!;
        return mul(x, [c! / size, -d! / size]);
      };
      const [p11, p21, c11, c21] = [at(copper!, 0), at(copper!, 4), at(bare!, 0), at(bare!, 4)];
      // Symmetric parts: S21 = p21^2 c21 / ((1 - p c)^2 - p^2 c21^2)
      const one = sub([1, 0], mul(p11, c11));
      const bottom = sub(mul(one, one), mul(mul(p11, p11), mul(c21, c21)));
      const expected = div(mul(mul(p21, p21), c21), bottom);
      const [re, im] = at(whole!, 4);
      expect(re).toBeCloseTo(expected[0]!, 12);
      expect(im).toBeCloseTo(expected[1]!, 12);
    }
    expect([...whole!.slice(0, 8)].every(Number.isFinite)).toBe(true);
  });

  it('are refused on a layer that is not there, by their own path', () => {
    const { elements, stackup } = read({
      kind: 'capacitor',
      ...body,
      pads: { layer: 'L9', widthM: 1e-3, lengthM: 1e-3 },
    });
    expect(elementProblems(elements[0]!, 'single-ended', stackup)).toEqual([
      expect.objectContaining({ path: 'pads.layer', message: expect.stringContaining('no copper layer L9') }),
    ]);
  });
});
