import { layer, quantityField, type QuantityField } from '@tollgate/contracts';

const [copper, dielectric] = layer.options;

/** A quantity of the schema as this screen offers it: bounds and words are the schema's, the unit is the desk's. */
function fieldOf(schema: Parameters<typeof quantityField>[0], unit?: string): QuantityField {
  const field = quantityField(schema);
  if (!field) throw new Error('The schema has no quantity here.');
  return unit === undefined ? field : { ...field, unit };
}

export const layerFields = {
  thicknessM: fieldOf(copper.shape.thicknessM, 'um'),
  thicknessToleranceM: fieldOf(copper.shape.thicknessToleranceM, 'um'),
  widthToleranceM: fieldOf(copper.shape.widthToleranceM, 'um'),
  conductivitySPerM: fieldOf(copper.shape.conductivitySPerM),
  etchAngleDeg: fieldOf(copper.shape.etchAngleDeg),
  dk: fieldOf(dielectric.shape.dk),
  dkTolerance: fieldOf(dielectric.shape.dkTolerance),
  df: fieldOf(dielectric.shape.df),
  dfTolerance: fieldOf(dielectric.shape.dfTolerance),
  atHz: fieldOf(dielectric.shape.atHz),
} as const;
export type LayerField = keyof typeof layerFields;

export const heightField: QuantityField = {
  dimension: 'length',
  label: 'Height',
  unit: 'um',
  min: 0,
  max: 1e-4,
};
