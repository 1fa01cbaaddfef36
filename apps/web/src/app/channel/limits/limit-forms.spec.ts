import { parseChannelFile, type CompleteChannel, type MaskSet } from '@tollgate/contracts';
import { asOwnNumbers, inForm, limitsOfSet, ofQuantity, ownLimit } from './limit-forms';

function channel(limits: unknown[] = []): CompleteChannel {
  const parsed = parseChannelFile({
    format: 'tollgate.channel/1',
    name: 'Lane 0',
    signaling: 'differential',
    symbolRateBd: 25.78125e9,
    elements: [{ kind: 'line', z0Ohm: 50, lengthM: 0.02, effectivePermittivity: 3.6 }],
    limits,
  });
  if (!parsed.ok) throw new Error(parsed.problems[0]?.message);
  return parsed.channel;
}

const set: MaskSet = {
  id: '6e1b9c2e-62a4-4f0e-9a3b-0a4f6f2c1d01',
  key: 'quay-loss',
  title: 'Quay loss',
  standard: 'Quay rules',
  clause: '4.2',
  status: 'informative',
  from: 'TP0',
  to: 'TP5',
  referenceOhm: 100,
  revision: 1,
  revisionId: '6e1b9c2e-62a4-4f0e-9a3b-0a4f6f2c1d02',
  limits: [
    {
      title: 'Loss',
      quantity: 'insertion-loss',
      sense: 'max',
      segments: [{ fromHz: 5e7, toHz: 1e10, formula: '1 + f' }],
    },
  ],
  beyond: ['eye height'],
  confidence: '',
};

describe('limits of a channel', () => {
  it('come from a mask set by value, with its ground and its revision', () => {
    const [limit] = limitsOfSet(set, channel([{ ...set.limits[0], id: 'limit-1' }]));
    expect(limit).toMatchObject({
      id: 'limit-2',
      status: 'informative',
      from: 'TP0',
      to: 'TP5',
      referenceOhm: 100,
      beyond: ['eye height'],
      source: { text: 'Quay rules, 4.2', itemRevision: set.revisionId },
    });
  });

  it('no longer name the revision once a number was changed by hand', () => {
    const [limit] = limitsOfSet(set, channel());
    const own = asOwnNumbers(limit!);
    expect(own.source).toEqual({ text: 'after Quay rules, 4.2' });
    expect(own.status).toBe('own');
    expect(asOwnNumbers(own)).toBe(own);
  });

  it('start at Nyquist where they are one’s own', () => {
    expect(ownLimit(channel())).toMatchObject({ atHz: 12.890625e9, status: 'own', id: 'limit-1' });
  });

  it('are accepted in every form they can be given in', () => {
    const own = ownLimit(channel());
    for (const form of ['segments', 'points', 'single'] as const) {
      expect(channel([inForm(own, form)]).limits).toHaveLength(1);
    }
    expect(inForm(inForm(own, 'points'), 'single')).toMatchObject({ atHz: own.atHz, db: own.db });
  });

  it('bring what a quantity needs, and drop what it may not have', () => {
    const own = ownLimit(channel());
    const converted = ofQuantity(own, 'mode-conversion');
    expect(converted.parameter).toBe('SCD21');
    expect(channel([converted]).limits).toHaveLength(1);
    const fitted = ofQuantity(converted, 'fitted-attenuation');
    expect(fitted.parameter).toBeUndefined();
    expect(channel([fitted]).limits[0]!.fit?.basis).toBe('line');
    expect(ofQuantity(own, 'return-loss-near').sense).toBe('min');
  });
});
