import { problemsOf, type FieldProblem } from '../problems';
import { stackup, type Layer, type Stackup } from './stackup';

/** A stackup that can be kept as a version: it has layers. */
export type CompleteStackup = Stackup & { layers: Layer[] };

export type ParsedStackup =
  | { readonly ok: true; readonly stackup: CompleteStackup }
  | { readonly ok: false; readonly problems: readonly FieldProblem[] };

/** Shape, bounds and units of a stackup, and what holds for each layer by itself; the result is in SI. */
export function parseStackup(document: unknown): ParsedStackup {
  const parsed = stackup.safeParse(document);
  if (!parsed.success) return { ok: false, problems: problemsOf(parsed.error, document).slice(0, 100) };
  const { layers } = parsed.data;
  if (!layers || layers.length === 0) return { ok: false, problems: [withoutLayers] };
  const problems = layerProblems(layers);
  return problems.length ? { ok: false, problems } : { ok: true, stackup: { ...parsed.data, layers } };
}

const withoutLayers: FieldProblem = {
  path: 'layers',
  message: 'A stackup has layers; this one has none.',
  mend: 'Give at least a signal layer, a dielectric and a plane.',
};

/** What is wrong with layers one by one: names twice, a causal model without losses, tolerances larger than their value. */
export function layerProblems(layers: readonly Layer[]): FieldProblem[] {
  return layers.flatMap((layer, i) => [
    ...twin(layers, layer, i),
    ...withoutLoss(layer, i),
    ...tooLoose(layer, i),
  ]);
}

function twin(layers: readonly Layer[], { name }: Layer, index: number): FieldProblem[] {
  const first = layers.findIndex((layer) => layer.name === name);
  if (first === index) return [];
  return [
    {
      path: `layers[${index}].name`,
      message: `"${name}" is also the name of layer ${first + 1}; a name is unique.`,
      mend: 'Give one of the two another name.',
    },
  ];
}

function withoutLoss(layer: Layer, index: number): FieldProblem[] {
  if (layer.kind === 'copper' || layer.dispersion !== 'wideband-debye' || layer.df > 0) return [];
  return [
    {
      path: `layers[${index}].df`,
      message: 'The wideband Debye model is causal: without loss it has no dispersion to follow.',
      mend: 'Give a Df above 0, or set the dispersion to constant.',
    },
  ];
}

/** A value less its tolerance must still be one: a thickness above 0, a Dk of 1 or more, a Df of 0 or more. */
function tooLoose(layer: Layer, index: number): FieldProblem[] {
  const problem = (field: string, what: string): FieldProblem => ({
    path: `layers[${index}].${field}`,
    message: `The tolerance leaves ${what}.`,
    mend: 'Give a smaller tolerance, or mend the value it belongs to.',
  });
  const found: FieldProblem[] = [];
  if ((layer.thicknessToleranceM ?? 0) >= layer.thicknessM)
    found.push(problem('thicknessToleranceM', 'no thickness'));
  if (layer.kind === 'copper') return found;
  if (layer.dk - (layer.dkTolerance ?? 0) < 1) found.push(problem('dkTolerance', 'a Dk below 1'));
  if (layer.df - (layer.dfTolerance ?? 0) < 0) found.push(problem('dfTolerance', 'a Df below 0'));
  return found;
}

/** What keeps layers from being a board that traces can run on. Paths as in the stackup. */
export function stackupProblems({ layers = [] }: Stackup): FieldProblem[] {
  if (layers.length === 0) return [withoutLayers];
  const copper = layers.filter((layer) => layer.kind === 'copper');
  const missing = (what: string, mend: string): FieldProblem => ({
    path: 'layers',
    message: `The stackup has no ${what}.`,
    mend,
  });
  const problems: FieldProblem[] = [];
  if (!copper.some(({ role }) => role === 'signal'))
    problems.push(missing('signal layer', 'Give a copper layer the role signal.'));
  if (!copper.some(({ role }) => role === 'plane'))
    problems.push(missing('plane to return on', 'Give a copper layer the role plane.'));
  if (!layers.some(({ kind }) => kind === 'dielectric'))
    problems.push(missing('dielectric', 'Give a dielectric between the copper layers.'));
  return [...layerProblems(layers), ...problems, ...layers.flatMap((_, i) => misplaced(layers, i))];
}

function misplaced(layers: readonly Layer[], index: number): FieldProblem[] {
  const layer = layers[index]!;
  const above = layers[index - 1];
  if (layer.kind === 'copper' && above?.kind === 'copper') {
    return [
      {
        path: `layers[${index}].kind`,
        message: `${layer.name} lies straight on ${above.name}.`,
        mend: 'Give a dielectric between the two copper layers.',
      },
    ];
  }
  if (layer.kind === 'soldermask' && index > 0 && index < layers.length - 1) {
    return [
      {
        path: `layers[${index}].kind`,
        message: `${layer.name} is solder mask inside the board.`,
        mend: 'Solder mask is the top or the bottom layer; make this one a dielectric, or move it out.',
      },
    ];
  }
  return [];
}
