import { parseChannelFile, type CheckView, type CompleteChannel } from '@tollgate/contracts';
import { sectionLayout, type Room } from './section-layout';

const room: Room = { width: 600, top: 40, height: 80, impedanceTop: 0, impedanceHeight: 20 };
const copper = (name: string, role: string) => ({ kind: 'copper', name, role, thicknessM: 20e-6 });
const dielectric = (name: string, thicknessM: number) => ({
  ...{ kind: 'dielectric', name, thicknessM, dk: 4, df: 0.01, atHz: 1e9, dispersion: 'constant' },
});

function read(elements: object[]): CompleteChannel {
  const parsed = parseChannelFile({
    ...{
      format: 'tollgate.channel/1',
      name: 'Strip',
      signaling: 'single-ended',
      referenceOhm: 50,
      limits: [],
    },
    stackup: {
      layers: [
        copper('L1', 'signal'),
        dielectric('D1', 180e-6),
        copper('L2', 'plane'),
        dielectric('D2', 780e-6),
        copper('L3', 'signal'),
      ],
    },
    elements,
  });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.problems));
  return parsed.channel;
}

const trace = (layer: string) => ({ kind: 'trace', layer, widthM: 1e-4, lengthM: 0.01 });
const via = { kind: 'via', fromLayer: 'L1', toLayer: 'L3', drillM: 2e-4, padM: 4e-4, antipadM: 7e-4 };
const viewOf = (elementDelaysS: number[], models: object[] = []) =>
  ({ elementDelaysS, models }) as unknown as CheckView;

describe('the strip over its stackup', () => {
  it('draws layers at their depth, and every element where its delay puts it', () => {
    const document = read([trace('L1'), via, trace('L3')]);
    const layout = sectionLayout(document, viewOf([100e-12, 5e-12, 300e-12]), room)!;
    const [l1, l2, l3] = layout.layers.map(({ y }) => y);
    expect(l2! - l1!).toBeCloseTo((80 * 200) / 1020, 6);
    expect(l3! - l2!).toBeCloseTo((80 * 800) / 1020, 6);
    const [first, second, third] = layout.pieces;
    expect(third!.width / first!.width).toBeCloseTo(3, 6);
    expect(second!.width).toBeGreaterThanOrEqual(14);
    expect(third!.x + third!.width).toBeCloseTo(600, 6);
    expect([first!.bars[0]!.y1, third!.bars[0]!.y1]).toEqual([l1, l3]);
  });

  it('hangs a stub off the path in scale with it, and names its notch', () => {
    const model = { kind: 'via', element: 'V1', throughM: 0.5e-3, notchHz: 26e9, sections: [] };
    const stubs = { aboveM: 0, belowM: 0.25e-3 };
    const layout = sectionLayout(read([via]), viewOf([5e-12], [{ ...model, stubs }]), room)!;
    const [barrel] = layout.pieces[0]!.bars.filter((bar) => bar.x1 === bar.x2 && !bar.spare);
    const [stub] = layout.pieces[0]!.bars.filter((bar) => bar.spare);
    expect((stub!.y2 - stub!.y1) / (barrel!.y2 - barrel!.y1)).toBeCloseTo(0.5, 6);
    expect(layout.pieces[0]!.stub!.text).toBe('stub 0.25 mm, notch 26.0 GHz');
  });

  it('puts parts on the layer the path is on, and the impedance of lines above', () => {
    const line = { kind: 'line', z0Ohm: 48, lengthM: 0.01, effectivePermittivity: 4 };
    const other = { ...line, z0Ohm: 52 };
    const document = read([trace('L3'), { kind: 'series', resistanceOhm: 1 }, line, other]);
    const layout = sectionLayout(document, viewOf([50e-12, 0, 60e-12, 60e-12]), room)!;
    const l3 = layout.layers[2]!.y;
    expect(layout.pieces[1]!.box!.y + layout.pieces[1]!.box!.height / 2).toBeCloseTo(l3, 9);
    expect(layout.impedanceRange).toEqual([48, 52]);
    expect(layout.impedance).toHaveLength(4);
    expect(layout.impedance[0]![1]).toBeGreaterThan(layout.impedance[2]![1]);
    expect(layout.ticks[0]).toEqual({ x: 0, ps: 0 });
  });

  it('is not drawn without a stackup', () => {
    const { stackup: _stackup, ...bare } = read([via]);
    expect(sectionLayout(bare as CompleteChannel, viewOf([0]), room)).toBeUndefined();
  });
});
