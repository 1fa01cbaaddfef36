import type { Ledger } from '@tollgate/contracts';
import { checkDocument, ownReference, readCase } from '../reference/load';

const fields = { lossSqrtDbPerM: 5, lossLinearDbPerM: 8, effectivePermittivity: 3.8 };
const low = { kind: 'line', z0Ohm: 38, lengthM: 0.06, ...fields };
const high = { kind: 'line', z0Ohm: 66, lengthM: 0.05, ...fields };
const evaluationHz = 7.3e9;

function ledgersOf(elements: object[], more: object = {}): readonly Ledger[] {
  const document = { format: 'tollgate.channel/1', name: 'Test', signaling: 'single-ended', elements };
  return checkDocument({
    ...document,
    evaluationHz,
    grid: { startHz: 1e8, stopHz: 1e10, points: 100 },
    ...more,
  }).ledger;
}

function ledgerOf(elements: object[], more: object = {}): Ledger {
  return ledgersOf(elements, more)[0]!;
}

function tolls(ledger: Ledger): number {
  return ledger.rows.reduce((sum, { tollDb }) => sum + tollDb!, 0);
}

describe('the ledger', () => {
  it('shows that the product of the parts is not the cascade: their losses do not add up, tolls and reflection do', () => {
    const [one, other, together] = [[low], [high], [low, high]].map((elements) => ledgerOf(elements));
    expect(Math.abs(one!.totalDb! + other!.totalDb! - together!.totalDb!)).toBeGreaterThan(0.05);
    expect(tolls(together!)).toBeCloseTo(tolls(one!) + tolls(other!), 12);
    expect(tolls(together!) + together!.reflectionDb!).toBeCloseTo(together!.totalDb!, 9);
  });

  it('charges the same tolls for a line split in four', () => {
    const quarter = { ...low, lengthM: 0.015 };
    const [whole, split] = [ledgerOf([low, high]), ledgerOf([quarter, quarter, quarter, quarter, high])];
    expect(tolls(split)).toBeCloseTo(tolls(whole), 12);
    expect(split.totalDb!).toBeCloseTo(whole.totalDb!, 10);
    expect(split.reflectionDb!).toBeCloseTo(whole.reflectionDb!, 9);
  });

  it('charges a line its attenuation times its length, however badly it is matched', () => {
    const { channel, expected } = readCase(ownReference, 'mismatch-line.json');
    for (const [hz, toll] of expected.tollDb!) {
      const [ledger] = checkDocument({ ...(channel as object), evaluationHz: hz }).ledger;
      expect(ledger!.rows[0]!.tollDb!).toBeCloseTo(toll, 10);
    }
  });

  it('charges a lossless part nothing, and its reflection to nobody', () => {
    const ledger = ledgerOf([{ kind: 'shunt', capacitanceF: 2e-13 }]);
    expect(ledger.rows[0]!.tollDb!).toBeCloseTo(0, 9);
    expect(ledger.reflectionDb!).toBeCloseTo(ledger.totalDb!, 9);
    expect(ledger.rows[0]!.savedIfIdealDb!).toBeCloseTo(ledger.totalDb!, 9);
  });

  it('saves exactly the loss of the channel without the element, within the smallest and largest around', () => {
    const stub = { kind: 'stub', end: 'open', z0Ohm: 50, lengthM: 0.004, effectivePermittivity: 4 };
    const [with_, without] = [ledgerOf([low, stub, high]), ledgerOf([low, high])];
    const row = with_.rows[1]!;
    expect(row.savedIfIdealDb!).toBeCloseTo(with_.totalDb! - without.totalDb!, 9);
    expect(row.savedRangeDb[0]!).toBeLessThan(row.savedIfIdealDb!);
    expect(row.savedRangeDb[1]!).toBeGreaterThan(row.savedIfIdealDb!);
  });

  it('is the same for two equal legs as for one', () => {
    const { atHz, ...single } = ledgerOf([low, high]);
    expect(ledgerOf([low, high], { signaling: 'differential' })).toEqual({ atHz, ...single });
  });

  it('charges a pair for its differential mode', () => {
    const pair = {
      kind: 'coupled-line',
      ...{
        evenZ0Ohm: 60,
        oddZ0Ohm: 41,
        evenEffectivePermittivity: 3.9,
        oddEffectivePermittivity: 3.6,
        lengthM: 0.08,
      },
      ...{ evenLoss: { sqrtDbPerM: 1 }, oddLoss: { sqrtDbPerM: 6 } },
    };
    const ledger = ledgerOf([pair], { signaling: 'differential' });
    expect(ledger.rows[0]!.tollDb!).toBeCloseTo(6 * Math.sqrt(7.3) * 0.08, 9);
  });

  it('balances the limit against the allotments at the evaluation frequency', () => {
    const limits = [
      { id: 'loss', title: 'Loss', quantity: 'insertion-loss', sense: 'max', atHz: evaluationHz, db: 4 },
    ];
    const elements = [
      { ...low, allotmentDb: 2 },
      { ...high, allotmentDb: 1.5 },
    ];
    const ledger = ledgerOf(elements, { limits, reflectionAllotmentDb: 1 });
    expect(ledger.limitDb).toBe(4);
    expect(ledger.limitId).toBe('loss');
    expect(ledger.reserveDb!).toBeCloseTo(-0.5, 12);
    expect(ledger.rows.map(({ allotmentDb }) => allotmentDb)).toEqual([2, 1.5]);
  });

  it('is read at the worst point of a limit too', () => {
    const segments = [{ fromHz: 1e9, toHz: 9e9, formula: '0.2 + f' }];
    const limits = [{ id: 'loss', title: 'Loss', quantity: 'insertion-loss', sense: 'max', segments }];
    const worst = ledgersOf([low, high], { limits })[1]!;
    expect(worst.limitId).toBe('loss');
    expect(worst.limitDb!).toBeCloseTo(0.2 + worst.atHz / 1e9, 9);
    expect(worst.reserveDb).toBeUndefined();
  });
});
