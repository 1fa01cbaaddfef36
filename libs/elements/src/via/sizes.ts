import { isCopper } from '../trace/layers';
import type { Barrel, PlacedLayer, Via } from './barrel';

type Size = number | Readonly<Record<string, number>>;

/** A pad's or antipad's diameter on a layer; undefined where sizes are given by layer and this one has none. */
export function sizeOn(size: Size, layer: string): number | undefined {
  if (typeof size === 'number') return size;
  return Object.hasOwn(size, layer) ? size[layer] : undefined;
}

/** Diameter of the pad on a layer in metres; 0 where there is none. By layer, a layer that is not named has its pad removed. */
export function padOn(via: Via, { layer }: PlacedLayer): number {
  return isCopper(layer) ? (sizeOn(via.padM, layer.name) ?? 0) : 0;
}

/** How much of the barrel lies in a layer. */
export function lengthInM(placed: PlacedLayer, barrel: Pick<Barrel, 'topM' | 'bottomM'>): number {
  return Math.min(placed.bottomM, barrel.bottomM) - Math.max(placed.topM, barrel.topM);
}

/** Copper layers the barrel goes through, wholly or in part. */
export function crossedCopper(barrel: Barrel): PlacedLayer[] {
  return barrel.layers.filter((placed) => isCopper(placed.layer) && lengthInM(placed, barrel) > 0);
}

export function isPlane({ layer }: PlacedLayer): boolean {
  return isCopper(layer) && layer.role === 'plane';
}

/**
 * Diameter of the surface a barrel returns on beside no plane: the antipads of the nearest planes it goes through, above and
 * below, as their geometric mean, which makes the impedance the mean of the two. Without any plane, the clearances given.
 */
export function returnDiameterM(via: Via, barrel: Barrel, placed: PlacedLayer): number | undefined {
  const crossed = crossedCopper(barrel);
  const planes = crossed.filter(isPlane);
  const above = planes.findLast((plane) => plane.bottomM <= placed.topM);
  const below = planes.find((plane) => plane.topM >= placed.bottomM);
  const near = planes.length ? [above, below].filter((plane) => plane !== undefined) : crossed;
  const diameters = near
    .map(({ layer }) => sizeOn(via.antipadM, layer.name))
    .filter((diameter) => diameter !== undefined && diameter > 0) as number[];
  if (diameters.every((diameter) => diameter === diameters[0])) return diameters[0];
  return Math.exp(diameters.reduce((sum, diameter) => sum + Math.log(diameter), 0) / diameters.length);
}
