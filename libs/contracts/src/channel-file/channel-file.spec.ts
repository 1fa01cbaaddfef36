import {
  channelJsonSchema,
  elementKinds,
  elementQuantities,
  newElement,
  parseChannelFile,
  parseChannelText,
} from '../index';

const minimal = {
  format: 'tollgate.channel/1',
  name: 'Lane 0',
  signaling: 'single-ended',
  elements: [{ kind: 'line', z0Ohm: '50 ohm', lengthM: '12 mil', effectivePermittivity: 3.6 }],
};

function problems(document: unknown) {
  const parsed = parseChannelFile(document);
  return parsed.ok ? [] : parsed.problems;
}

function accepted(document: unknown) {
  const parsed = parseChannelFile(document);
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.problems));
  return parsed.channel;
}

describe('the channel file', () => {
  it('turns text with units into SI numbers and fills in defaults and ids', () => {
    const channel = accepted(minimal);
    expect(channel.elements[0]).toEqual({
      id: 'L1',
      kind: 'line',
      z0Ohm: 50,
      lengthM: 304.8e-6,
      effectivePermittivity: 3.6,
      lossSqrtDbPerM: 0,
      lossLinearDbPerM: 0,
    });
    expect(channel.referenceOhm).toBe(50);
    expect(channel.limits).toEqual([]);
  });

  it('gives what it returned back unchanged', () => {
    const channel = accepted(minimal);
    expect(accepted(channel)).toEqual(channel);
  });

  it('refuses an unknown field with its path', () => {
    expect(problems({ ...minimal, elements: [{ ...minimal.elements[0], colour: 'red' }] })).toEqual([
      {
        path: 'elements[0].colour',
        message: '"colour" is not a field known here.',
        mend: 'Remove it or correct its spelling.',
      },
    ]);
  });

  it('refuses an impedance so small that it is a short', () => {
    const line = { ...minimal.elements[0], z0Ohm: 1e-18 };
    expect(problems({ ...minimal, elements: [line] })[0]).toMatchObject({ path: 'elements[0].z0Ohm' });
    expect(problems({ ...minimal, referenceOhm: 1e-18 })[0]).toMatchObject({ path: 'referenceOhm' });
    expect(problems({ ...minimal, elements: [{ ...line, z0Ohm: 1e-6 }] })).toEqual([]);
  });

  it('names the field and what would be right', () => {
    const broken = {
      ...minimal,
      elements: [{ kind: 'line', z0Ohm: -5, lengthM: '3 parsec', effectivePermittivity: null }],
    };
    expect(problems(broken).map((problem) => problem.path)).toEqual([
      'elements[0].z0Ohm',
      'elements[0].lengthM',
      'elements[0].effectivePermittivity',
    ]);
    expect(problems(broken)[1]!.message).toContain('"parsec" is not a unit of length');
  });

  it('refuses a kind it does not know and lists those it does', () => {
    const [problem] = problems({ ...minimal, elements: [{ kind: 'wormhole' }] });
    expect(problem!.path).toBe('elements[0].kind');
    expect(problem!.message).toContain('touchstone');
  });

  it('refuses two elements of one id', () => {
    const twins = [
      { id: 'a', ...minimal.elements[0] },
      { id: 'a', ...minimal.elements[0] },
    ];
    expect(problems({ ...minimal, elements: twins })[0]!.path).toBe('elements[1].id');
  });

  it('refuses non-finite numbers, unsorted frequencies and too many points', () => {
    expect(problems({ ...minimal, symbolRateBd: Infinity })[0]!.path).toBe('symbolRateBd');
    expect(problems({ ...minimal, grid: { frequenciesHz: [1e9, 1e9] } })[0]!.path).toBe(
      'grid.frequenciesHz[1]',
    );
    expect(problems({ ...minimal, grid: { startHz: 0, stopHz: 1e9, points: 20_002 } })[0]!.path).toBe(
      'grid.points',
    );
  });

  it.each([
    [{ title: 'x', quantity: 'insertion-loss', sense: 'max' }, 'limits[0]'],
    [{ title: 'x', quantity: 'insertion-loss', sense: 'max', atHz: 1e9 }, 'limits[0].db'],
    [
      {
        title: 'x',
        quantity: 'insertion-loss',
        sense: 'max',
        points: [
          [2e9, 1],
          [1e9, 2],
        ],
        interpolation: 'linear',
      },
      'limits[0].points',
    ],
    [
      {
        title: 'x',
        quantity: 'insertion-loss',
        sense: 'max',
        points: [
          [1e9, 1],
          [2e9, 2],
        ],
      },
      'limits[0].interpolation',
    ],
    [{ title: 'x', quantity: 'mode-conversion', sense: 'min', atHz: 1e9, db: 20 }, 'limits[0].parameter'],
    [
      {
        title: 'x',
        quantity: 'insertion-loss',
        sense: 'max',
        segments: [{ fromHz: 2e9, toHz: 1e9, formula: 'f' }],
      },
      'limits[0].segments[0].toHz',
    ],
  ])('refuses a limit that is not whole: %j', (limit, path) => {
    expect(problems({ ...minimal, limits: [limit] }).map((problem) => problem.path)).toContain(path);
  });

  it('wants as many references as ports', () => {
    expect(problems({ ...minimal, referenceOhm: [50, 50, 50, 50] })[0]!.path).toBe('referenceOhm');
    expect(accepted({ ...minimal, referenceOhm: [50, [42, -7]] }).referenceOhm).toEqual([50, [42, -7]]);
  });

  it('tells where the text stops being JSON', () => {
    const parsed = parseChannelText('{ "format": ');
    expect(parsed.ok ? '' : parsed.problems[0]!.message).toContain('not JSON');
  });

  it('is published as a JSON Schema in which a quantity is a number or text', () => {
    const text = JSON.stringify(channelJsonSchema());
    expect(text).toContain('"type":["number","string"]');
    expect(text).toContain('rlgc-line');
    expect(text.length).toBeGreaterThan(5000);
  });
});

describe('element kinds', () => {
  it.each(elementKinds.map((entry) => entry.kind))('%s starts with values its own schema accepts', (kind) => {
    const start = newElement(kind, 'differential');
    const filled =
      kind === 'trace'
        ? { ...start, layer: 'L1' }
        : kind === 'via'
          ? { ...start, fromLayer: 'L1', toLayer: 'L3' }
          : start;
    expect(problems({ ...minimal, signaling: 'differential', elements: [filled] })).toEqual([]);
  });

  it('tells a form every quantity with its path, unit and default', () => {
    expect(elementQuantities('line').map((field) => field.path.join('.'))).toEqual([
      'z0Ohm',
      'lengthM',
      'effectivePermittivity',
      'lossSqrtDbPerM',
      'lossLinearDbPerM',
    ]);
    expect(elementQuantities('tee').map((field) => field.path.join('.'))).toContain('shunt.capacitanceF');
    expect(elementQuantities('coupled-line').map((field) => field.path.join('.'))).toContain(
      'evenLoss.sqrtDbPerM',
    );
    expect(elementQuantities('line')[3]).toMatchObject({
      dimension: 'lossPerLength',
      unit: 'dB/m',
      optional: true,
      default: 0,
    });
  });
});
