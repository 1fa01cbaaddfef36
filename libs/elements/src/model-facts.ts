import type { ChannelElement, ModelFacts, Signaling, Stackup } from '@tollgate/contracts';
import { fieldOf, fieldSource, solutionOf } from './trace/field-model';
import { sectionOf } from './trace/section';
import { dispersionLimitHz } from '@tollgate/lines';
import { viaFacts } from './via';

/**
 * What a trace or via was computed from: solver or formulas, mesh error, inputs and range; undefined for kinds that state their
 * own values.
 * @throws ElementError, LineError where the element has no model
 */
export function elementModel(
  element: ChannelElement & { readonly id: string },
  signaling: Signaling,
  stackup: Stackup | undefined,
): ModelFacts | undefined {
  if (element.kind === 'via') {
    const { sections, sources, ...facts } = viaFacts(element, signaling, stackup);
    return { kind: 'via', element: element.id, ...facts, sections: [...sections], sources: [...sources] };
  }
  if (element.kind !== 'trace') return undefined;
  const section = sectionOf(stackup, element);
  const { field } = fieldOf(section);
  const { unknowns, error, modes } = solutionOf(field);
  const sheets = [...section.sheets, ...(section.mask ? [section.mask] : [])];
  return {
    kind: 'trace',
    element: element.id,
    source: fieldSource,
    unknowns,
    errorZ0: error.z0,
    errorPermittivity: error.permittivity,
    modes: (['single', 'even', 'odd'] as const).flatMap((mode) => {
      const found = modes[mode];
      if (!found) return [];
      const { z0Ohm, effectivePermittivity } = found;
      return [{ mode, z0Ohm, effectivePermittivity }];
    }),
    planes: section.planes,
    sheets: sheets.map(({ layer, thicknessM, material: { dk, df, atHz } }) => ({
      ...{ layer, thicknessM, dk, df, atHz },
    })),
    validToHz: dispersionLimitHz(field),
  };
}
