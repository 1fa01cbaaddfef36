import type { Limit, MaskSet } from '@tollgate/contracts';

/** Documents are written the way a person would type them; the server reads them as it reads anyone's. */
export interface DemoChannel {
  readonly link: string;
  readonly document: Record<string, unknown>;
}

const source = 'Invented for the demonstration';

function limitOf(set: MaskSet): Limit {
  const { limits, revisionId, standard, clause } = set;
  return { ...limits[0]!, source: { text: `${standard}, ${clause}`, itemRevision: revisionId } };
}

interface PairFacts {
  readonly name: string;
  readonly topMm: number;
  readonly innerMm: number;
  readonly lastMm: number;
  readonly stubMm?: number;
  readonly mezzanine: string;
  readonly limits: readonly Limit[];
  readonly symbolRate?: string;
}

function innerPair(label: string, lengthMm: number) {
  return {
    kind: 'coupled-line',
    label,
    evenZ0Ohm: 56,
    oddZ0Ohm: 48.6,
    evenEffectivePermittivity: 3.52,
    oddEffectivePermittivity: 3.48,
    lengthM: `${lengthMm} mm`,
    evenLoss: { sqrtDbPerM: '6.2 dB/m', linearDbPerM: '2.2 dB/m' },
    oddLoss: { sqrtDbPerM: '6.6 dB/m', linearDbPerM: '2.3 dB/m' },
    source,
  };
}

function outerPair(label: string, lengthMm: number) {
  return {
    ...innerPair(label, lengthMm),
    evenZ0Ohm: 61,
    oddZ0Ohm: 49.4,
    evenEffectivePermittivity: 3.05,
    oddEffectivePermittivity: 2.82,
  };
}

function viaPair(label: string, stubMm?: number) {
  const barrel = [
    {
      kind: 'pair-shunt',
      label: `${label}, pads`,
      capacitanceF: '70 fF',
      mutualCapacitanceF: '12 fF',
      source,
    },
    {
      kind: 'pair-series',
      label: `${label}, barrels`,
      inductanceH: '260 pH',
      mutualInductanceH: '55 pH',
      source,
    },
  ];
  if (stubMm === undefined) return barrel;
  return [
    ...barrel,
    {
      kind: 'stub',
      label: `${label}, stub`,
      end: 'open',
      z0Ohm: 42,
      lengthM: `${stubMm} mm`,
      effectivePermittivity: 3.9,
      lossSqrtDbPerM: 9,
      lossLinearDbPerM: 5,
      source,
    },
  ];
}

/** A pair from a switch to a mezzanine connector: outer layer, via, inner layer, via, coupling capacitor, connector. */
function mezzaninePair(facts: PairFacts): Record<string, unknown> {
  return {
    format: 'tollgate.channel/1',
    name: facts.name,
    signaling: 'differential',
    referenceOhm: 50,
    symbolRateBd: facts.symbolRate ?? '25.78125 GBd',
    stackup: { temperatureC: 40 },
    elements: [
      { ...outerPair('L1 escape', facts.topMm), allotmentDb: '0.5 dB' },
      ...viaPair('via at the switch'),
      { ...innerPair('L3 run', facts.innerMm), allotmentDb: '8 dB' },
      ...viaPair('via at the connector', facts.stubMm),
      {
        kind: 'capacitor',
        label: 'AC coupling',
        capacitanceF: '100 nF',
        seriesInductanceH: '250 pH',
        seriesResistanceOhm: '40 mohm',
        padCapacitanceF: '38 fF',
        allotmentDb: '0.3 dB',
        source,
      },
      { ...outerPair('L1 to the connector', facts.lastMm), allotmentDb: '0.8 dB' },
      {
        kind: 'connector',
        label: 'mezzanine J4',
        fileId: facts.mezzanine,
        portOrder: '1-3,2-4',
        below: 'to-dc',
        standing: 'measured',
        source: { text: source, date: '2026-05-12' },
        allotmentDb: '1.5 dB',
      },
    ],
    limits: facts.limits,
    reflectionAllotmentDb: '0.5 dB',
  };
}

function ownLimit(title: string, db: number, atHz: string): Record<string, unknown> {
  return {
    title,
    quantity: 'insertion-loss',
    sense: 'max',
    atHz,
    db: `${db} dB`,
    status: 'own',
    source: 'Demonstration board rules',
  };
}

const nearReturnLoss = {
  title: 'Return loss at the near end',
  quantity: 'return-loss-near',
  sense: 'min',
  points: [
    ['50 MHz', '12 dB'],
    ['6 GHz', '12 dB'],
    ['12.9 GHz', '6 dB'],
  ],
  interpolation: 'log',
  status: 'own',
  source: 'Demonstration board rules',
};

function clock(name: string, launchFile: string | undefined): Record<string, unknown> {
  const end = launchFile
    ? {
        kind: 'touchstone',
        label: 'edge launch',
        fileId: launchFile,
        source: { text: source, date: '2026-04-02' },
        standing: 'measured',
        below: 'to-dc',
      }
    : { kind: 'shunt', label: 'edge launch', capacitanceF: '55 fF', source };
  return {
    format: 'tollgate.channel/1',
    name,
    signaling: 'single-ended',
    referenceOhm: 50,
    evaluationHz: '5 GHz',
    elements: [
      {
        kind: 'line',
        label: 'L1 from the synthesizer',
        z0Ohm: 49.2,
        lengthM: '1.4 in',
        effectivePermittivity: 2.95,
        lossSqrtDbPerM: 5.8,
        lossLinearDbPerM: 3.1,
        source,
      },
      {
        kind: 'pi',
        label: 'matching pad',
        near: { resistanceOhm: '870 ohm' },
        series: { resistanceOhm: '5.8 ohm' },
        far: { resistanceOhm: '870 ohm' },
        source,
      },
      {
        kind: 'line',
        label: 'L6 to the edge',
        z0Ohm: 50.8,
        lengthM: '62 mm',
        effectivePermittivity: 3.6,
        lossSqrtDbPerM: 6.1,
        lossLinearDbPerM: 2.7,
        source,
      },
      end,
    ],
    limits: [
      launchFile
        ? {
            title: 'Clock insertion loss',
            quantity: 'insertion-loss',
            sense: 'max',
            segments: [{ fromHz: '100 MHz', toHz: '14 GHz', formula: '1.5 + 1.1*sqrt(f) + 0.16*f' }],
            status: 'own',
            source: 'Demonstration board rules',
          }
        : ownLimit('Clock loss at 5 GHz', 3.2, '5 GHz'),
    ],
  };
}

export interface DemoFiles {
  readonly mezzanine: string;
  readonly launch: string;
}

export function lineCardChannels(files: DemoFiles, kr4: MaskSet, c2m: MaskSet): DemoChannel[] {
  const lane = (n: number, innerMm: number, stubMm?: number): DemoChannel => ({
    link: 'Switch to mezzanine',
    document: mezzaninePair({
      name: `Lane ${n}, switch to mezzanine`,
      topMm: 8.1,
      innerMm,
      lastMm: 14,
      stubMm,
      mezzanine: files.mezzanine,
      limits: [limitOf(kr4), nearReturnLoss as unknown as Limit],
    }),
  });
  const uplink = (name: string, innerMm: number, stubMm?: number): DemoChannel => ({
    link: 'Uplink to module cage',
    document: mezzaninePair({
      name,
      topMm: 5.5,
      innerMm,
      lastMm: 9,
      stubMm,
      mezzanine: files.mezzanine,
      limits: [limitOf(c2m)],
    }),
  });
  return [
    lane(0, 60.2),
    lane(1, 61.8),
    lane(2, 62.1, 0.35),
    lane(3, 62.4, 0.94),
    uplink('Uplink pair A', 58),
    uplink('Uplink pair B, the long way round the memory', 236, 1.62),
    { link: 'Clocks', document: clock('Clock fan-out 7', undefined) },
    { link: 'Clocks', document: clock('Clock reference to the board edge', files.launch) },
  ];
}

export function backplaneChannels(files: DemoFiles, kr: MaskSet): DemoChannel[] {
  const pair = (name: string, innerMm: number): DemoChannel => ({
    link: 'Slot 1 to slot 2',
    document: mezzaninePair({
      name,
      topMm: 6,
      innerMm,
      lastMm: 6,
      mezzanine: files.mezzanine,
      limits: [limitOf(kr)],
      symbolRate: '10.3125 GBd',
    }),
  });
  return [pair('Slot 1 to slot 2, pair 0', 310), pair('Slot 1 to slot 2, pair 1', 312)];
}
