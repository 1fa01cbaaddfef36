import type { Dielectric } from '@tollgate/lines';
import type { Stackup } from '@tollgate/contracts';
import { isCopper } from '../trace/layers';
import { materialOf } from '../trace/material';
import type { Barrel, PlacedLayer } from './barrel';
import { isPlane } from './sizes';

const air: Dielectric = { dk: 1, df: 0, atHz: 1e9, dispersion: 'constant' };

/**
 * What fills the space around the barrel at a layer. Inner copper lies in the dielectric of the side away from its foot, which
 * flowed around it. At an outer plane the antipad holds the solder mask, or air. At outer copper of role signal there is no
 * wall beside the barrel: the field of the barrel's end runs through the laminate to the nearest plane, so it counts as
 * laminate; that also stands for some of the open end's own field, which is not modelled otherwise.
 */
export function materialAt(barrel: Barrel, stackup: Stackup, placed: PlacedLayer): Dielectric {
  const { layer } = placed;
  if (!isCopper(layer)) return materialOf(layer);
  const { layers } = barrel;
  const index = layers.indexOf(placed);
  const outer = index === 0 || index === layers.length - 1;
  if (outer && isPlane(placed)) return maskBeside(stackup, index === 0);
  const step = outer ? (index === 0 ? 1 : -1) : layer.foilSide === 'down' ? -1 : 1;
  return nextDielectric(layers, index, step) ?? nextDielectric(layers, index, -step) ?? air;
}

function nextDielectric(layers: readonly PlacedLayer[], index: number, step: number): Dielectric | undefined {
  for (let i = index + step; i >= 0 && i < layers.length; i += step) {
    const { layer } = layers[i]!;
    if (!isCopper(layer)) return materialOf(layer);
  }
  return undefined;
}

function maskBeside(stackup: Stackup, top: boolean): Dielectric {
  const layers = stackup.layers ?? [];
  const outer = top ? layers[0] : layers[layers.length - 1];
  return outer?.kind === 'soldermask' ? materialOf(outer) : air;
}
