import type { ModelFacts } from '@tollgate/contracts';
import { formatQuantity } from '@tollgate/quantities';

type TraceModel = Extract<ModelFacts, { kind: 'trace' }>;
type ViaModel = Extract<ModelFacts, { kind: 'via' }>;

const ohm = (value: number) => formatQuantity(value, 'resistance', { digits: 4 });
const hz = (value: number) => formatQuantity(value, 'frequency', { digits: 3 });
const mm = (value: number) => formatQuantity(value, 'length', { unit: 'mm', digits: 4 });
const percent = (share: number) => `${Number((share * 100).toPrecision(2))} %`;

/** A model in sentences, the impedance first. */
export function modelLines(model: ModelFacts): string[] {
  return model.kind === 'trace' ? traceLines(model) : viaLines(model);
}

function traceLines({ modes, planes, sheets, source, errorZ0, unknowns, validToHz }: TraceModel): string[] {
  const of = (name: string) => modes.find(({ mode }) => mode === name);
  const [single, even, odd] = [of('single'), of('even'), of('odd')];
  const sides = [planes.above && `${planes.above} above`, planes.below && `${planes.below} below`];
  return [
    single ? `${ohm(single.z0Ohm)}, effective permittivity ${single.effectivePermittivity.toFixed(3)}` : '',
    even && odd
      ? `${ohm(2 * odd.z0Ohm)} differential, ${ohm(even.z0Ohm / 2)} common; odd ${ohm(odd.z0Ohm)}, even ${ohm(even.z0Ohm)}`
      : '',
    `Returns on ${sides.filter(Boolean).join(' and ')}`,
    sheets
      .map(({ layer, thicknessM, dk, df }) => `${layer} ${mm(thicknessM)}, Dk ${dk}, Df ${df}`)
      .join('; '),
    `By ${source}, ${unknowns} unknowns, mesh error of Z0 ${percent(errorZ0)}`,
    validToHz === null ? '' : `Dispersion published to ${hz(validToHz)}`,
  ].filter(Boolean);
}

function viaLines({ throughM, stubs, notchHz, validToHz, sources, meshErrorShare }: ViaModel): string[] {
  const hanging = [
    stubs.aboveM > 0 && `${mm(stubs.aboveM)} above`,
    stubs.belowM > 0 && `${mm(stubs.belowM)} below`,
  ].filter(Boolean);
  return [
    `${mm(throughM)} in the path, ${hanging.length ? `stubs ${hanging.join(' and ')}` : 'no stub'}`,
    notchHz === null ? '' : `Notch of its own at ${hz(notchHz)}`,
    validToHz === null ? '' : `Estimated to ${hz(validToHz)}; above that out of range`,
    `By ${sources.join('; ')}${meshErrorShare > 0 ? `, mesh error ${percent(meshErrorShare)}` : ''}`,
  ].filter(Boolean);
}
