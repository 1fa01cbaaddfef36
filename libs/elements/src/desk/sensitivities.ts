import type { Layer, Stackup } from '@tollgate/contracts';
import { sectionOf, type SectionInput } from '../trace/section';
import { isCopper } from '../trace/layers';
import { impedanceOf, type WantedMode } from './synthesis';

/** How an impedance answers to one quantity: ohm for a rise of that quantity by `step`, about a hundredth of it. */
export interface Sensitivity {
  readonly of: 'width' | 'gap' | 'height' | 'dk' | 'copper thickness';
  readonly layer: string;
  /** In the quantity's own unit (m, or 1 for dk). */
  readonly value: number;
  readonly ohmPerUnit: number;
  /** Percent of the impedance for one percent of the quantity. */
  readonly relative: number;
}

const share = 0.01;

/** Central differences of the impedance by width, gap, copper and every dielectric that the section meets. */
export function sensitivitiesOf(stackup: Stackup, input: SectionInput, mode: WantedMode): Sensitivity[] {
  const met = new Set(sectionOf(stackup, input).sheets.map(({ layer }) => layer));
  const { mask } = sectionOf(stackup, input);
  if (mask) met.add(mask.layer);
  const base = impedanceOf(stackup, input, mode);
  const told = (
    of: Sensitivity['of'],
    layer: string,
    value: number,
    at: (value: number) => number,
  ): Sensitivity => {
    const ohmPerUnit = (at(value * (1 + share)) - at(value * (1 - share))) / (2 * share * value);
    return { of, layer, value, ohmPerUnit, relative: (ohmPerUnit * value) / base };
  };
  const withLayer = (name: string, change: (layer: Layer) => Layer): Stackup => ({
    ...stackup,
    layers: stackup.layers?.map((layer) => (layer.name === name ? change(layer) : layer)),
  });
  const out = [
    told('width', input.layer, input.widthM, (widthM) => impedanceOf(stackup, { ...input, widthM }, mode)),
  ];
  if (input.gapM !== undefined) {
    out.push(told('gap', input.layer, input.gapM, (gapM) => impedanceOf(stackup, { ...input, gapM }, mode)));
  }
  for (const layer of stackup.layers ?? []) {
    if (isCopper(layer)) {
      if (layer.name !== input.layer) continue;
      const at = (thicknessM: number) =>
        impedanceOf(
          withLayer(layer.name, (l) => ({ ...l, thicknessM })),
          input,
          mode,
        );
      out.push(told('copper thickness', layer.name, layer.thicknessM, at));
    } else if (met.has(layer.name)) {
      const thicker = (thicknessM: number) =>
        impedanceOf(
          withLayer(layer.name, (l) => ({ ...l, thicknessM })),
          input,
          mode,
        );
      const denser = (dk: number) =>
        impedanceOf(
          withLayer(layer.name, (l) => (isCopper(l) ? l : { ...l, dk })),
          input,
          mode,
        );
      out.push(
        told('height', layer.name, layer.thicknessM, thicker),
        told('dk', layer.name, layer.dk, denser),
      );
    }
  }
  return out;
}
