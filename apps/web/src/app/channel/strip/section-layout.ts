import type { CheckView, CompleteChannel, Layer, ModelFacts } from '@tollgate/contracts';

/** A copper layer's line across the strip. */
export interface LayerLine {
  readonly name: string;
  readonly y: number;
  readonly plane: boolean;
}

/** A bar of copper: a trace on its layer, or a stretch of barrel; `spare` is a stub that hangs off the path. */
export interface Bar {
  readonly x1: number;
  readonly y1: number;
  readonly x2: number;
  readonly y2: number;
  readonly spare: boolean;
}

export interface SectionPiece {
  readonly id: string;
  readonly x: number;
  readonly width: number;
  readonly bars: readonly Bar[];
  /** A part drawn as a box on the layer it stands on. */
  readonly box?: { readonly x: number; readonly y: number; readonly width: number; readonly height: number };
  /** What to write beside a stub. */
  readonly stub?: { readonly x: number; readonly y: number; readonly text: string };
}

export interface SectionLayout {
  readonly layers: readonly LayerLine[];
  readonly pieces: readonly SectionPiece[];
  /** Impedance along the way as points of a line, and the largest and smallest on it. */
  readonly impedance: readonly (readonly [x: number, y: number])[];
  readonly impedanceRange?: readonly [number, number];
  readonly ticks: readonly { readonly x: number; readonly ps: number }[];
}

/** Room of the drawing, in its own units. */
export interface Room {
  readonly width: number;
  readonly top: number;
  readonly height: number;
  readonly impedanceTop: number;
  readonly impedanceHeight: number;
}

/** A part without a length of its own is given this much, so that it can be seen and hit. */
const leastWidth = 14;

/** The channel unrolled: electrical distance from left to right, the stackup in scale from top to bottom. */
export function sectionLayout(
  document: CompleteChannel,
  view: CheckView,
  room: Room,
): SectionLayout | undefined {
  const layers = layerLines(document.stackup?.layers ?? [], room);
  if (layers.length === 0) return undefined;
  const yOf = (name: string | undefined) => layers.find((layer) => layer.name === name)?.y;
  const xs = positions(view.elementDelaysS, room.width);
  let y = firstLayer(document, yOf) ?? layers[0]!.y;
  const models = new Map(view.models.map((model) => [model.element, model]));
  const pieces = document.elements.map((element, i): SectionPiece => {
    const [x, end] = [xs[i]!, xs[i + 1]!];
    const frame = { id: element.id, x, width: end - x };
    if (element.kind === 'trace') {
      y = yOf(element.layer) ?? y;
      return { ...frame, bars: [{ x1: x, y1: y, x2: end, y2: y, spare: false }] };
    }
    if (element.kind === 'via') {
      const [from, to] = [yOf(element.fromLayer) ?? y, yOf(element.toLayer) ?? y];
      y = to;
      return viaPiece(frame, [from, to], models.get(element.id), layers);
    }
    const board = ['line', 'rlgc-line', 'coupled-line', 'line-pair'].includes(element.kind);
    const bars = [{ x1: x, y1: y, x2: end, y2: y, spare: false }];
    const middle = (x + end) / 2;
    const width = Math.min(Math.max(end - x - 4, 10), 46);
    return board
      ? { ...frame, bars }
      : { ...frame, bars, box: { x: middle - width / 2, y: y - 8, width, height: 16 } };
  });
  return {
    layers,
    pieces,
    ...impedanceLine(document, view, xs, room),
    ticks: ticksOf(view.elementDelaysS, xs),
  };
}

function firstLayer(
  document: CompleteChannel,
  yOf: (name: string) => number | undefined,
): number | undefined {
  for (const element of document.elements) {
    if (element.kind === 'trace') return yOf(element.layer);
    if (element.kind === 'via') return yOf(element.fromLayer);
  }
  return undefined;
}

/** Middle of each copper layer, the whole stackup filling the room. */
function layerLines(layers: readonly Layer[], { top, height }: Room): LayerLine[] {
  const total = layers.reduce((sum, layer) => sum + layer.thicknessM, 0);
  let depth = 0;
  return layers.flatMap((layer) => {
    const middle = depth + layer.thicknessM / 2;
    depth += layer.thicknessM;
    if (layer.kind !== 'copper') return [];
    return [{ name: layer.name, y: top + (height * middle) / total, plane: layer.role === 'plane' }];
  });
}

/** Where each element begins and the last ends: by delay, and none narrower than can be seen. */
function positions(delaysS: readonly number[], width: number): number[] {
  const least = Math.min(leastWidth, width / (2 * Math.max(1, delaysS.length)));
  const total = delaysS.reduce((sum, delay) => sum + delay, 0);
  const natural = delaysS.map((delay) => (total > 0 ? (width * delay) / total : 0));
  const wide = natural.filter((each) => each > least).reduce((sum, each) => sum + each, 0);
  const room = width - natural.filter((each) => each <= least).length * least;
  const xs = [0];
  for (const each of natural) xs.push(xs.at(-1)! + (each > least ? (each / wide) * room : least));
  return wide > 0 ? xs : xs.map((_, i) => (i * width) / Math.max(1, delaysS.length));
}

function viaPiece(
  frame: Pick<SectionPiece, 'id' | 'x' | 'width'>,
  [from, to]: readonly [number, number],
  model: ModelFacts | undefined,
  layers: readonly LayerLine[],
): SectionPiece {
  const x = frame.x + frame.width / 2;
  const [upper, lower] = [Math.min(from, to), Math.max(from, to)];
  const path: Bar[] = [
    { x1: frame.x, y1: from, x2: x, y2: from, spare: false },
    { x1: x, y1: upper, x2: x, y2: lower, spare: false },
    { x1: x, y1: to, x2: frame.x + frame.width, y2: to, spare: false },
  ];
  if (model?.kind !== 'via') return { ...frame, bars: path };
  // Drawn in the scale of the path, where it has one.
  const outer = layers.at(-1)!.y - layers[0]!.y;
  const perM = model.throughM > 0 ? (lower - upper) / model.throughM : 0;
  const { aboveM, belowM } = model.stubs;
  const reach = (lengthM: number) => Math.min(lengthM * perM, outer);
  const stubs: Bar[] = [];
  if (aboveM > 0) stubs.push({ x1: x, y1: upper - reach(aboveM), x2: x, y2: upper, spare: true });
  if (belowM > 0) stubs.push({ x1: x, y1: lower, x2: x, y2: lower + reach(belowM), spare: true });
  const longest = Math.max(aboveM, belowM);
  if (longest === 0) return { ...frame, bars: path };
  const notch = model.notchHz === null ? '' : `, notch ${(model.notchHz / 1e9).toPrecision(3)} GHz`;
  const y = belowM >= aboveM ? lower + reach(belowM) - 4 : upper - reach(aboveM) + 10;
  return {
    ...frame,
    bars: [...path, ...stubs],
    stub: { x: x + 6, y, text: `stub ${(longest * 1e3).toPrecision(2)} mm${notch}` },
  };
}

/** Impedance of each element that is a line, as steps; differential for a pair. */
function impedanceLine(
  document: CompleteChannel,
  view: CheckView,
  xs: readonly number[],
  { impedanceTop, impedanceHeight }: Room,
): Pick<SectionLayout, 'impedance' | 'impedanceRange'> {
  const models = new Map(view.models.map((model) => [model.element, model]));
  const known = document.elements.flatMap((element, i) => {
    const ohm = impedanceOf(element, models.get(element.id), document.signaling === 'differential');
    return ohm === undefined ? [] : [{ ohm, from: xs[i]!, to: xs[i + 1]! }];
  });
  if (known.length === 0) return { impedance: [] };
  const all = known.map(({ ohm }) => ohm);
  const [least, most] = [Math.min(...all), Math.max(...all)];
  const spread = Math.max(most - least, 0.1 * most);
  const y = (ohm: number) => impedanceTop + impedanceHeight * (0.5 - (ohm - (least + most) / 2) / spread);
  const impedance = known.flatMap(({ ohm, from, to }): [number, number][] => [
    [from, y(ohm)],
    [to, y(ohm)],
  ]);
  return { impedance, impedanceRange: [least, most] };
}

function impedanceOf(
  element: CompleteChannel['elements'][number],
  model: ModelFacts | undefined,
  pair: boolean,
): number | undefined {
  const each = pair ? 2 : 1;
  if (element.kind === 'line') return each * element.z0Ohm;
  if (element.kind === 'coupled-line') return 2 * element.oddZ0Ohm;
  if (element.kind === 'line-pair') return element.p.z0Ohm + element.n.z0Ohm;
  if (model?.kind !== 'trace') return undefined;
  const mode = model.modes.find(({ mode: name }) => name === (pair ? 'odd' : 'single'));
  return mode && each * mode.z0Ohm;
}

/** Round numbers of picoseconds where they stand on the drawing, about ten of them. */
function ticksOf(delaysS: readonly number[], xs: readonly number[]): { x: number; ps: number }[] {
  const ends = delaysS.reduce<number[]>((list, delay) => [...list, list.at(-1)! + delay * 1e12], [0]);
  const total = ends.at(-1)!;
  if (!(total > 0)) return [];
  const rough = total / 10;
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = power * ([1, 2, 5].find((each) => each * power >= rough) ?? 10);
  const ticks: { x: number; ps: number }[] = [];
  for (let ps = 0; ps <= total; ps += step) {
    const i = Math.max(0, ends.findIndex((end, k) => k > 0 && end >= ps) - 1);
    const span = ends[i + 1]! - ends[i]!;
    const share = span > 0 ? (ps - ends[i]!) / span : 0;
    ticks.push({ x: xs[i]! + share * (xs[i + 1]! - xs[i]!), ps: Number(ps.toPrecision(6)) });
  }
  return ticks;
}
