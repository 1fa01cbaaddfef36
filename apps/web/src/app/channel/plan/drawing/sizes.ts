import type { ElementOf } from '@tollgate/contracts';
import { bodySizes } from '../layout/bodies';
import type { PlanNode } from '../layout/plan-layout';

/** Least size of a symbol on the screen in px, along and across the channel. */
const leastPx: Readonly<Record<PlanNode['body'], readonly [number, number]>> = {
  via: [18, 18],
  capacitor: [14, 17],
  connector: [26, 58],
  part: [24, 24],
  loss: [22, 14],
  lump: [12, 12],
};

/** Half length and half width of a symbol in mm: as large as its part, and never too small to see. */
export function halfSizeMm(body: PlanNode['body'], pxPerM: number): readonly [number, number] {
  const { lengthM, widthM } = bodySizes[body];
  const [along, across] = leastPx[body];
  const pxPerMm = pxPerM / 1e3;
  return [Math.max(lengthM * 1e3, along / pxPerMm) / 2, Math.max(widthM * 1e3, across / pxPerMm) / 2];
}

export interface ViaRings {
  readonly drill: number;
  readonly pad: number;
  readonly antipad: number;
  /** Half the distance of a pair's barrels, 0 while they are drawn as one. */
  readonly half: number;
}

/** Radii of a via in mm: in scale once that is large enough to see, else rings that tell hole, pad and antipad. */
export function viaRings(via: ElementOf<'via'>, pxPerM: number): ViaRings {
  const pxPerMm = pxPerM / 1e3;
  const real = (lengthM: number) => lengthM * 500;
  const drill = real(via.drillM);
  const pad = real(largest(via.padM));
  const antipad = real(largest(via.antipadM));
  const half = (via.pitchM ?? 0) * 500;
  const apart = half > 0 && half * pxPerMm > 12 && half > pad;
  const least = (radius: number, px: number) => Math.max(radius, px / pxPerMm);
  return {
    drill: least(drill, apart ? 2 : 3.6),
    pad: least(pad, apart ? 4 : 8),
    antipad: least(antipad, apart ? 6 : 13),
    half: apart ? half : 0,
  };
}

function largest(value: number | Record<string, number>): number {
  return typeof value === 'number' ? value : Math.max(0, ...Object.values(value));
}
