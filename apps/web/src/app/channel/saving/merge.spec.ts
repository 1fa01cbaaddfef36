import { parseChannelFile, type CompleteChannel } from '@tollgate/contracts';
import { mergeDocuments } from './merge';

function channel(): CompleteChannel {
  const parsed = parseChannelFile({
    format: 'tollgate.channel/1',
    name: 'Lane 0',
    signaling: 'single-ended',
    elements: [
      { kind: 'line', id: 'L1', z0Ohm: 50, lengthM: 0.02, effectivePermittivity: 3.6 },
      { kind: 'series', id: 'S1', resistanceOhm: 1 },
      { kind: 'line', id: 'L2', z0Ohm: 50, lengthM: 0.03, effectivePermittivity: 3.6 },
    ],
    limits: [{ id: 'limit-1', title: 'Loss', quantity: 'insertion-loss', sense: 'max', atHz: 5e9, db: 4 }],
  });
  if (!parsed.ok) throw new Error(parsed.problems[0]?.message);
  return parsed.channel;
}

type Element = CompleteChannel['elements'][number];

function changed(id: string, fields: object): CompleteChannel {
  const document = channel();
  const elements = document.elements.map((each) => (each.id === id ? { ...each, ...fields } : each));
  return { ...document, elements };
}

const idsOf = (document: CompleteChannel) => document.elements.map((element) => element.id);
const find = (document: CompleteChannel, id: string) =>
  document.elements.find((element) => element.id === id) as Element & Record<string, unknown>;

describe('joining two edits of a channel', () => {
  it('takes what only one side touched, field by field', () => {
    const mine = changed('L1', { lengthM: 0.05 });
    const theirs = changed('L1', { z0Ohm: 45 });
    const { document, conflicts } = mergeDocuments(channel(), mine, theirs);
    expect(conflicts).toEqual([]);
    expect(find(document, 'L1')).toMatchObject({ lengthM: 0.05, z0Ohm: 45 });
  });

  it('finds what both changed, keeps mine until told otherwise', () => {
    const mine = changed('L1', { lengthM: 0.05 });
    const theirs = changed('L1', { lengthM: 0.07 });
    const { document, conflicts } = mergeDocuments(channel(), mine, theirs);
    expect(conflicts).toEqual([
      { key: 'elements.L1.lengthM', where: 'L1', field: 'lengthM', mine: 0.05, theirs: 0.07 },
    ]);
    expect(find(document, 'L1')['lengthM']).toBe(0.05);
    const other = mergeDocuments(channel(), mine, theirs, new Map([['elements.L1.lengthM', 'theirs']]));
    expect(find(other.document, 'L1')['lengthM']).toBe(0.07);
  });

  it('does not call the same change on both sides a conflict', () => {
    const both = changed('S1', { resistanceOhm: 2 });
    expect(mergeDocuments(channel(), both, changed('S1', { resistanceOhm: 2 })).conflicts).toEqual([]);
  });

  it('keeps additions of both sides at their neighbours, and gives mine another id where both took the same', () => {
    const mine = channel();
    mine.elements.splice(1, 0, { kind: 'shunt', id: 'P1', capacitanceF: 1e-13 });
    const theirs = channel();
    theirs.elements.push({ kind: 'shunt', id: 'P1', capacitanceF: 2e-13 });
    const { document, conflicts } = mergeDocuments(channel(), mine, theirs);
    expect(conflicts).toEqual([]);
    expect(idsOf(document)).toEqual(['L1', 'P2', 'S1', 'L2', 'P1']);
    expect(find(document, 'P2')['capacitanceF']).toBe(1e-13);
  });

  it('removes what one side removed and the other left alone', () => {
    const mine = { ...channel(), elements: channel().elements.filter((each) => each.id !== 'S1') };
    const { document, conflicts } = mergeDocuments(channel(), mine, changed('L2', { lengthM: 0.01 }));
    expect(conflicts).toEqual([]);
    expect(idsOf(document)).toEqual(['L1', 'L2']);
    expect(find(document, 'L2')['lengthM']).toBe(0.01);
  });

  it('asks where one side removed what the other edited', () => {
    const mine = { ...channel(), elements: channel().elements.filter((each) => each.id !== 'S1') };
    const theirs = changed('S1', { resistanceOhm: 3 });
    const merged = mergeDocuments(channel(), mine, theirs);
    expect(merged.conflicts.map((conflict) => conflict.key)).toEqual(['elements.S1']);
    expect(idsOf(merged.document)).toEqual(['L1', 'L2']);
    const kept = mergeDocuments(channel(), mine, theirs, new Map([['elements.S1', 'theirs']]));
    expect(idsOf(kept.document)).toEqual(['L1', 'S1', 'L2']);
  });

  it('follows the side that moved an element', () => {
    const theirs = { ...channel(), elements: [...channel().elements].reverse() };
    expect(idsOf(mergeDocuments(channel(), changed('L1', { z0Ohm: 48 }), theirs).document)).toEqual([
      'L2',
      'S1',
      'L1',
    ]);
  });

  it('merges limits and the channel’s own fields too', () => {
    const mine = { ...channel(), name: 'Lane 7' };
    const theirs = channel();
    theirs.limits[0] = { ...theirs.limits[0]!, db: 5 };
    const { document, conflicts } = mergeDocuments(channel(), mine, theirs);
    expect(conflicts).toEqual([]);
    expect([document.name, document.limits[0]!.db]).toEqual(['Lane 7', 5]);
  });
});
