import type { FieldProblem } from '../problems';
import type { Layer, Stackup } from './stackup';

/** Ranges outside which a value is possible and unusual. Common practice, from memory. */
const usual = {
  dielectricM: [20e-6, 3e-3],
  soldermaskM: [5e-6, 80e-6],
  copperM: [5e-6, 140e-6],
  dk: [1.9, 7],
  /** A glass-epoxy laminate loses this much and more; its Dk does not go far above 5. */
  lossyDf: 0.012,
  lossyDk: 5.5,
  df: [0.0002, 0.05],
  boardM: 8e-3,
} as const;

/** What is possible but worth a second look, with the path of the value. Nothing here is refused. */
export function stackupCautions({ layers = [] }: Stackup): FieldProblem[] {
  const found = layers.flatMap((layer, i) =>
    cautionsOf(layer).map(({ path, message, mend }) => ({ path: `layers[${i}].${path}`, message, mend })),
  );
  const boardM = layers.reduce((sum, { thicknessM }) => sum + thicknessM, 0);
  if (boardM > usual.boardM) {
    found.push({
      path: 'layers',
      message: `The layers add up to ${figure(boardM * 1e3)} mm.`,
      mend: 'Check the units of the thicknesses.',
    });
  }
  return found;
}

function cautionsOf(layer: Layer): FieldProblem[] {
  const found: FieldProblem[] = [];
  const say = (path: string, message: string, mend: string) => found.push({ path, message, mend });
  const [thin, thick] = usual[`${layer.kind}M`];
  if (layer.thicknessM < thin || layer.thicknessM > thick) {
    say(
      'thicknessM',
      `${layer.name} is ${lengthOf(layer.thicknessM)} thick, which is unusual for ${kindWords[layer.kind]}.`,
      'Check the unit, and ask the fabricator.',
    );
  }
  if (layer.kind === 'copper') {
    if (layer.roughness === undefined) {
      say(
        'roughness',
        `${layer.name} has no roughness: smooth copper is assumed, and its loss comes out too low.`,
        'Give the Rz or Rq of the foil.',
      );
    }
    return found;
  }
  const { dk, df, dispersion, name } = layer;
  if (dk > usual.lossyDk && df >= usual.lossyDf) {
    say(
      'dk',
      `${name} has a Dk of ${figure(dk)} at a Df of ${figure(df)}, which no glass-epoxy laminate reaches.`,
      'Check it against the data sheet at this frequency.',
    );
  } else if (dk < usual.dk[0] || dk > usual.dk[1]) {
    say('dk', `A Dk of ${figure(dk)} is unusual for a board.`, 'Check it against the data sheet.');
  }
  if (df > usual.df[1] || (df > 0 && df < usual.df[0]))
    say('df', `A Df of ${figure(df)} is unusual for a board.`, 'Check it against the data sheet.');
  if (dispersion === 'constant' && df > 0) {
    say(
      'dispersion',
      `${name} keeps Dk and Df at every frequency, which is not causal.`,
      'Choose wideband Debye, unless this is what you want.',
    );
  }
  return found;
}

const kindWords = {
  copper: 'copper',
  dielectric: 'a dielectric',
  soldermask: 'solder mask',
} as const;

function lengthOf(lengthM: number): string {
  return lengthM < 1e-3 ? `${figure(lengthM * 1e6)} um` : `${figure(lengthM * 1e3)} mm`;
}

function figure(value: number): string {
  return String(Number(value.toPrecision(4)));
}
