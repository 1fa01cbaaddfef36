import type { Dielectric } from '@tollgate/lines';
import type { DielectricLayer } from './layers';

/** The material of a layer, without its place and thickness. */
export function materialOf({ dk, df, atHz, dispersion, furtherPoints }: DielectricLayer): Dielectric {
  return { dk, df, atHz, dispersion, ...(furtherPoints?.length ? { furtherPoints } : {}) };
}

export function sameMaterial(a: Dielectric, b: Dielectric): boolean {
  const said = ({ dk, df, atHz, dispersion, furtherPoints = [] }: Dielectric) =>
    JSON.stringify([
      dk,
      df,
      atHz,
      dispersion,
      furtherPoints.map((point) => [point.dk, point.df, point.atHz]),
    ]);
  return said(a) === said(b);
}
