import { parseChannelFile, type CheckView, type CompleteChannel, type Ledger } from '@tollgate/contracts';
import { ledgerLines } from './ledger-rows';

function channel(): CompleteChannel {
  const parsed = parseChannelFile({
    format: 'tollgate.channel/1',
    name: 'Lane 0',
    signaling: 'single-ended',
    elements: [
      { kind: 'line', id: 'L1', label: 'to the edge', z0Ohm: 50, lengthM: 0.02, effectivePermittivity: 3.6 },
      { kind: 'capacitor', id: 'C1', ...capacitor },
    ],
  });
  if (!parsed.ok) throw new Error(parsed.problems[0]?.message);
  return parsed.channel;
}

const capacitor = {
  capacitanceF: 1e-7,
  seriesInductanceH: 3e-10,
  seriesResistanceOhm: 0.05,
  padCapacitanceF: 4e-14,
};
const view = {
  elementStandings: [{ element: 'L1', standing: 'estimated', reason: '' }],
} as unknown as CheckView;
const ledger: Ledger = {
  atHz: 5e9,
  totalDb: 3,
  reflectionDb: 0.1,
  rows: [
    { element: 'L1', tollDb: 2.5, savedIfIdealDb: 2.4, savedRangeDb: [2.3, 2.4], allotmentDb: 2 },
    { element: 'C1', tollDb: null, savedIfIdealDb: 0.1, savedRangeDb: [0.1, 0.1], allotmentDb: 1 },
  ],
};

describe('lines of the ledger', () => {
  const [line, part] = ledgerLines(ledger, view, channel());

  it('name the element, its standing, and numbers with two decimals', () => {
    expect(line).toMatchObject({
      id: 'L1',
      name: 'to the edge',
      values: '50 ohm, 20 mm',
      standing: 'estimated',
      toll: '2.50',
      saved: '2.30 to 2.40',
      allotted: '2.00',
    });
  });

  it('give the balance its sign and its share of the largest', () => {
    expect(line!.balanceDb).toBeCloseTo(-0.5);
    expect(line!.bar).toBeCloseTo(1);
  });

  it('say where nothing is transmitted, and draw no balance there', () => {
    expect(part).toMatchObject({ name: 'AC-coupling capacitor', toll: 'no transmission', saved: '0.10' });
    expect(part!.balanceDb).toBeUndefined();
  });
});
