import {
  addBlock,
  invertBlock,
  makeBlocks,
  multiplyBlock,
  onePlusBlock,
  putBlock,
  takeBlock,
} from './blocks';
import { cascadePorts } from './chain';
import type { Network } from './network';
import { checkSameGrid, NetworkError, sameReference } from './network';
import { reversePorts } from './ports';
import { renormalize } from './renormalize';

/**
 * What is left of `total` when the known `fixture` is taken off its near end: total = fixture then result. The star product solved
 * for its second part, so that deep losses keep their digits; 2 ports or 2 + 2.
 * With X = F12^-1 (T11 - F11) F21^-1: D11 = (1 + X F22)^-1 X, D21 = T21 F21^-1 (1 - F22 D11),
 * D12 = (1 - D11 F22) F12^-1 T12, D22 = T22 - D21 (1 - F22 D11)^-1 F22 D12.
 *
 * @throws NetworkError where the fixture passes nothing, or grids or ports differ
 */
export function deembedNear(total: Network, fixture: Network): Network {
  checkSameGrid(total, fixture);
  const ports = cascadePorts(total);
  if (fixture.ports !== ports) {
    throw new NetworkError(
      `The fixture has ${fixture.ports} ports, the measurement ${ports}.`,
      'Use a fixture of the same ports.',
    );
  }
  const n = ports / 2;
  const known = alignNear(fixture, total);
  const joint = jointReference(known, ports);
  const f = sameReference(joint, known.referenceOhm) ? known : renormalize(known, joint);
  const s = new Float64Array(total.s.length);
  const b = makeBlocks(14, n);
  for (let point = 0; point < total.frequenciesHz.length; point++) {
    removeNear(s, total.s, f.s, point * ports * ports * 2, n, b, total.frequenciesHz[point]!);
  }
  const referenceOhm = total.referenceOhm.slice();
  referenceOhm.set(f.referenceOhm.subarray(ports), 0);
  return { ports, frequenciesHz: total.frequenciesHz, s, referenceOhm };
}

/** The same at the far end: total = result then fixture, the fixture's far ports outermost. */
export function deembedFar(total: Network, fixture: Network): Network {
  return reversePorts(deembedNear(reversePorts(total), reversePorts(fixture)));
}

function alignNear(fixture: Network, total: Network): Network {
  const wanted = fixture.referenceOhm.slice();
  wanted.set(total.referenceOhm.subarray(0, total.ports), 0);
  return sameReference(wanted, fixture.referenceOhm) ? fixture : renormalize(fixture, wanted);
}

function jointReference(fixture: Network, ports: number): Float64Array {
  const reference = fixture.referenceOhm.slice();
  for (let port = ports / 2; port < ports; port++) reference[port * 2 + 1] = 0;
  return reference;
}

function removeNear(
  out: Float64Array,
  total: Float64Array,
  fixture: Float64Array,
  at: number,
  n: number,
  blocks: Float64Array[],
  frequencyHz: number,
): void {
  const [f11, f12, f21, f22, t11, t12, t21, t22, x, work, d11, d12, d21, loop] = blocks as Fourteen;
  takeBlock(f11, fixture, at, n, 0, 0);
  takeBlock(f12, fixture, at, n, 0, 1);
  takeBlock(f21, fixture, at, n, 1, 0);
  takeBlock(f22, fixture, at, n, 1, 1);
  takeBlock(t11, total, at, n, 0, 0);
  takeBlock(t12, total, at, n, 0, 1);
  takeBlock(t21, total, at, n, 1, 0);
  takeBlock(t22, total, at, n, 1, 1);
  const passes = invertBlock(x, f12, n);
  f12.set(x);
  if (!passes || !invertBlock(x, f21, n)) {
    throw new NetworkError(
      `The fixture passes nothing at ${frequencyHz} Hz, so it cannot be taken off.`,
      'Leave this frequency out or use another fixture.',
    );
  }
  f21.set(x);
  addBlock(t11, t11, f11, -1);
  multiplyBlock(work, f12, t11, n);
  multiplyBlock(x, work, f21, n);
  multiplyBlock(work, x, f22, n);
  onePlusBlock(loop, work, 1, n);
  if (!invertBlock(work, loop, n)) {
    throw new NetworkError(
      `The measurement at ${frequencyHz} Hz contradicts the fixture.`,
      'Check that the fixture belongs to it.',
    );
  }
  multiplyBlock(d11, work, x, n);
  multiplyBlock(work, f22, d11, n);
  onePlusBlock(loop, work, -1, n);
  multiplyBlock(work, t21, f21, n);
  multiplyBlock(d21, work, loop, n);
  multiplyBlock(work, d11, f22, n);
  onePlusBlock(x, work, -1, n);
  multiplyBlock(work, f12, t12, n);
  multiplyBlock(d12, x, work, n);
  // D21 (1 - F22 D11)^-1 = T21 F21^-1
  multiplyBlock(work, t21, f21, n);
  multiplyBlock(x, f22, d12, n);
  multiplyBlock(loop, work, x, n);
  addBlock(t22, t22, loop, -1);
  putBlock(out, d11, at, n, 0, 0);
  putBlock(out, d12, at, n, 0, 1);
  putBlock(out, d21, at, n, 1, 0);
  putBlock(out, t22, at, n, 1, 1);
}
type Seven = [
  Float64Array,
  Float64Array,
  Float64Array,
  Float64Array,
  Float64Array,
  Float64Array,
  Float64Array,
];
type Fourteen = [...Seven, ...Seven];
