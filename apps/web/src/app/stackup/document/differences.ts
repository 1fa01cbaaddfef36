import type { Layer, Stackup } from '@tollgate/contracts';
import { formatQuantity, type Dimension } from '@tollgate/quantities';

interface Told {
  readonly title: string;
  readonly dimension?: Dimension;
}

/** Values in the order they are told in, as a sentence names them. */
const values: Readonly<Record<string, Told>> = {
  thicknessM: { title: 'thickness', dimension: 'length' },
  thicknessToleranceM: { title: 'thickness tolerance', dimension: 'length' },
  dk: { title: 'Dk', dimension: 'ratio' },
  dkTolerance: { title: 'Dk tolerance', dimension: 'ratio' },
  df: { title: 'Df', dimension: 'ratio' },
  dfTolerance: { title: 'Df tolerance', dimension: 'ratio' },
  atHz: { title: 'frequency of Dk and Df', dimension: 'frequency' },
  dispersion: { title: 'dispersion' },
  role: { title: 'role' },
  foilSide: { title: 'foot of the foil' },
  roughness: { title: 'roughness' },
  etchAngleDeg: { title: 'etch angle', dimension: 'angle' },
  conductivitySPerM: { title: 'conductivity', dimension: 'conductivity' },
  widthToleranceM: { title: 'width tolerance', dimension: 'length' },
  source: { title: 'source' },
};

/** What was changed from one stackup to another, a sentence each; layers are the same where their names are. */
export function differencesOf(from: Stackup, to: Stackup): string[] {
  const [before, after] = [from.layers ?? [], to.layers ?? []];
  const named = (layers: readonly Layer[], name: string) => layers.find((layer) => layer.name === name);
  const removed = before.filter(({ name }) => !named(after, name)).map(({ name }) => `${name} is gone.`);
  const told = after.flatMap((layer) => {
    const earlier = named(before, layer.name);
    return earlier ? changesOf(earlier, layer) : [`${layer.name} is new.`];
  });
  const common = (layers: readonly Layer[], others: readonly Layer[]) =>
    layers.flatMap(({ name }) => (named(others, name) ? [name] : [])).join('\n');
  const moved =
    common(before, after) === common(after, before) ? [] : ['The order of the layers is another.'];
  const { temperatureC } = to;
  const warmer =
    from.temperatureC === temperatureC
      ? []
      : [`The board's temperature: ${celsius(from.temperatureC)}, now ${celsius(temperatureC)}.`];
  return [...removed, ...told, ...moved, ...warmer];
}

function changesOf(from: Layer, to: Layer): string[] {
  if (from.kind !== to.kind) return [`${to.name}: ${from.kind}, now ${to.kind}.`];
  const [before, after] = [from, to] as unknown as Record<string, unknown>[];
  return Object.entries(values).flatMap(([key, { title, dimension }]) => {
    const [was, is] = [before![key], after![key]].map((value) => worded(value, dimension));
    return was === is ? [] : [`${to.name}, ${title}: ${was}, now ${is}.`];
  });
}

function worded(value: unknown, dimension: Dimension | undefined): string {
  if (value === undefined) return 'none';
  if (typeof value === 'number' && dimension) return formatQuantity(value, dimension);
  if (typeof value === 'object') return roughnessWords(value as Record<string, unknown>);
  return typeof value === 'string' ? value : JSON.stringify(value);
}

/** Roughness of both faces, or of the foot and the top. */
export function roughnessWords(value: Record<string, unknown>): string {
  if ('foot' in value) {
    const [foot, top] = [value['foot'], value['top']].map((face) =>
      roughnessWords(face as Record<string, unknown>),
    );
    return foot === top ? foot! : `foot ${foot}, top ${top}`;
  }
  const { model, rqM, rzM } = value as { model: string; rqM?: number; rzM?: number };
  if (model === 'none') return 'smooth';
  const height =
    rzM === undefined
      ? `Rq ${formatQuantity(rqM ?? 0, 'length', { digits: 3 })}`
      : `Rz ${formatQuantity(rzM, 'length', { digits: 3 })}`;
  return `${model} ${height}`;
}

function celsius(temperatureC: number | undefined): string {
  return temperatureC === undefined ? 'none' : `${temperatureC} °C`;
}
