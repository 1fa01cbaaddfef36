import type { Signaling, Stackup } from '@tollgate/contracts';
import { elementProblems } from '../index';
import type { Via } from './barrel';
import { buildVia, viaProblems } from './index';
import { contextOf, copper, eightLayers, laminate, via } from './testing/boards';

const twoLayers: Stackup = {
  layers: [copper('T', 'signal'), laminate('D', 1.5e-3, 4.2), copper('B', 'signal')],
};
const twin: Stackup = { layers: [...eightLayers.layers!, laminate('P5', 1e-4, 4), copper('L3', 'signal')] };

type Row = [
  fact: string,
  fields: Partial<Via>,
  path: string,
  message: string,
  signaling?: Signaling,
  stackup?: Stackup | null,
];

const rows: Row[] = [
  ['a stackup that is not there', {}, 'fromLayer', 'no copper layers', 'single-ended', null],
  ['a layer that is nowhere', { toLayer: 'L9' }, 'toLayer', 'no copper layer L9; it has L1, L2, L3'],
  ['a dielectric as a layer', { fromLayer: 'C1' }, 'fromLayer', 'no copper layer C1'],
  ['two layers of one name', {}, 'toLayer', '2 copper layers are called L3', 'single-ended', twin],
  ['a way from a layer to itself', { toLayer: 'L1' }, 'toLayer', 'to the same layer'],
  ['a barrel that ends above its layer', { barrel: ['L1', 'L2'] }, 'barrel', 'L1 to L2 does not reach L3'],
  ['a barrel that begins below its layer', { barrel: ['L2', 'L8'] }, 'barrel', 'does not reach L1'],
  ['a barrel upside down', { barrel: ['L8', 'L1'] }, 'barrel', 'L8 does not lie above its bottom L1'],
  ['a barrel to nowhere', { barrel: ['L1', 'L9'] }, 'barrel[1]', 'no copper layer L9'],
  [
    'a residual longer than the barrel',
    { backdrill: { bottomResidualM: 2e-3 } },
    'backdrill.bottomResidualM',
    '2 mm is longer than the barrel below L3, which is 1.161 mm',
  ],
  [
    'a residual where nothing stands above',
    { backdrill: { topResidualM: 0.1e-3 } },
    'backdrill.topResidualM',
    'above L1, which is 0 mm',
  ],
  ['a pad as wide as its drill', { padM: 0.25e-3 }, 'padM', '0.25 mm on L1 is not larger than the drill'],
  ['a narrow pad on one layer', { padM: { L1: 0.5e-3, L3: 0.2e-3 } }, 'padM.L3', '0.2 mm on L3'],
  [
    'a pad on a layer that is nowhere',
    { padM: { L1: 0.5e-3, L33: 0.5e-3 } },
    'padM.L33',
    'no copper layer L33',
  ],
  ['a pad as wide as the antipad of a plane', { padM: 0.8e-3 }, 'padM', 'not smaller than the antipads'],
  [
    'an antipad that the drill fills',
    { antipadM: 0.25e-3 },
    'antipadM',
    '0.25 mm on L2 is not larger than the drill',
  ],
  [
    'an antipad of 0 on a plane',
    { antipadM: { L2: 0, L4: 8e-4, L5: 8e-4, L7: 8e-4 } },
    'antipadM.L2',
    '0 mm on L2',
  ],
  ['a plane without an antipad', { antipadM: { L2: 8e-4, L4: 8e-4, L5: 8e-4 } }, 'antipadM.L7', 'crosses L7'],
  ['a pair without pitch', {}, 'pitchM', 'has no pitch', 'differential'],
  ['a pitch in a single-ended channel', { pitchM: 1e-3 }, 'pitchM', '1 mm belongs to a pair'],
  ['drills that meet', { pitchM: 0.2e-3 }, 'pitchM', 'two drills of 0.25 mm meet', 'differential'],
  [
    'pads that meet',
    { pitchM: 0.5e-3, padM: 0.5e-3 },
    'padM',
    'two pads of 0.5 mm on L1 meet',
    'differential',
  ],
  ['a return via in an antipad', { returnVias: [[0.5e-3, 0]] }, 'returnVias[0]', 'antipad of 0.8 mm on L2'],
  [
    'a return via in the barrel',
    {
      returnVias: [
        [1e-3, 0],
        [0.1e-3, 0],
      ],
    },
    'returnVias[1]',
    'meets the via',
  ],
  [
    'two return vias in one place',
    {
      returnVias: [
        [1e-3, 0],
        [1.1e-3, 0],
      ],
    },
    'returnVias[1]',
    'meets returnVias[0]',
  ],
  [
    'a return via in the antipad of the n leg',
    { pitchM: 1e-3, returnVias: [[0.9e-3, 0]] },
    'returnVias[0]',
    'antipad',
    'differential',
  ],
  [
    'a via without anything to return on',
    { fromLayer: 'T', toLayer: 'B', antipadM: {} },
    'antipadM',
    'no plane (only T, B)',
    'single-ended',
    twoLayers,
  ],
  [
    'a clearance that the drill fills',
    { fromLayer: 'T', toLayer: 'B', antipadM: 0.2e-3 },
    'antipadM',
    'not larger than the drill',
    'single-ended',
    twoLayers,
  ],
];

describe('a via is refused for', () => {
  it.each(rows)('%s', (_, fields, path, message, signaling = 'single-ended', stackup = eightLayers) => {
    const problems = viaProblems(via(fields), signaling, stackup ?? undefined);
    const found = problems.find((problem) => problem.path === path);
    expect(found?.message).toContain(message);
    expect(found?.mend).toMatch(/^[A-Z].*\.$/);
    expect(elementProblems(via(fields), signaling, stackup ?? undefined)).toEqual(problems);
    const context = { ...contextOf(eightLayers, signaling), stackup: stackup ?? undefined };
    expect(() => buildVia(via(fields), Float64Array.of(1e9), context)).toThrow(problems[0]!.message);
  });

  it('each of several things at once', () => {
    const fields = via({ padM: 0.2e-3, returnVias: [[0.5e-3, 0]], pitchM: 1e-3 });
    expect(viaProblems(fields, 'single-ended', eightLayers).map(({ path }) => path)).toEqual([
      'pitchM',
      'padM',
      'returnVias[0]',
    ]);
  });
});

describe('a via is not refused for', () => {
  it.each<[string, Partial<Via>, Stackup?]>([
    ['running upward', { fromLayer: 'L8', toLayer: 'L3' }],
    ['being blind', { toLayer: 'L3', barrel: ['L1', 'L3'], padM: 0.45e-3 }],
    ['being buried', { fromLayer: 'L3', toLayer: 'L6', barrel: ['L3', 'L6'] }],
    ['a residual as long as the barrel', { backdrill: { bottomResidualM: 1.161e-3 } }],
    ['a residual of 0', { backdrill: { topResidualM: 0, bottomResidualM: 0 } }],
    ['ending on a plane', { toLayer: 'L4' }],
    ['two layers and clearances', { fromLayer: 'T', toLayer: 'B' }, twoLayers],
    [
      'two layers and a return via',
      { fromLayer: 'T', toLayer: 'B', antipadM: 0, returnVias: [[1e-3, 0]] },
      twoLayers,
    ],
    ['no antipad on a plane that it does not cross', { barrel: ['L1', 'L3'], antipadM: { L2: 0.8e-3 } }],
    [
      'no antipad on a plane it is drilled free of',
      { backdrill: { bottomResidualM: 0.1e-3 }, antipadM: { L2: 0.8e-3 } },
    ],
  ])('%s', (_, fields, stackup = eightLayers) => {
    expect(viaProblems(via(fields), 'single-ended', stackup)).toEqual([]);
    expect(buildVia(via(fields), Float64Array.of(0, 1e9), contextOf(stackup)).s.every(Number.isFinite)).toBe(
      true,
    );
  });
});
