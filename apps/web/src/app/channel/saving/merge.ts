import { freeId, kindDescription, type CompleteChannel, type ElementKind } from '@tollgate/contracts';
import { isSame } from './same';

export type Side = 'mine' | 'theirs';

/** A field that two people have changed, differently. */
export interface Conflict {
  /** `elements.T1.lengthM`; of a thing that one side removed, `elements.T1`. */
  readonly key: string;
  readonly where: string;
  readonly field: string;
  readonly mine: unknown;
  readonly theirs: unknown;
}

export interface Merged {
  readonly document: CompleteChannel;
  readonly conflicts: readonly Conflict[];
}

type Fields = Record<string, unknown>;
interface Item extends Fields {
  readonly id: string;
}
type Choices = ReadonlyMap<string, Side>;

/**
 * Joins two edits of one document: what only one side touched is taken, element by element and field by field; what both
 * touched is a conflict, settled as `choices` says and otherwise as mine.
 */
export function mergeDocuments(
  base: CompleteChannel,
  mine: CompleteChannel,
  theirs: CompleteChannel,
  choices: Choices = new Map(),
): Merged {
  const merge = new Merge(choices);
  const { elements, limits, ...fields } = base;
  const { elements: myElements, limits: myLimits, ...myFields } = mine;
  const { elements: theirElements, limits: theirLimits, ...theirFields } = theirs;
  const document = {
    ...merge.fields(fields, myFields, theirFields, '', 'The channel'),
    elements: merge.list('elements', elements, myElements, theirElements, prefixOfElement),
    limits: merge.list('limits', limits, myLimits, theirLimits, () => 'limit-'),
  } as CompleteChannel;
  return { document, conflicts: merge.conflicts };
}

function prefixOfElement(item: Item): string {
  return kindDescription(item['kind'] as ElementKind).prefix;
}

class Merge {
  readonly conflicts: Conflict[] = [];

  constructor(private readonly choices: Choices) {}

  fields(base: Fields, mine: Fields, theirs: Fields, key: string, where: string): Fields {
    const names = new Set([...Object.keys(theirs), ...Object.keys(mine), ...Object.keys(base)]);
    const result: Fields = {};
    for (const name of names) {
      const at = key === '' ? name : `${key}.${name}`;
      const value = this.value(base[name], mine[name], theirs[name], at, where, name);
      if (value !== undefined) result[name] = value;
    }
    return result;
  }

  list(
    name: string,
    base: readonly Item[],
    mine: readonly Item[],
    theirs: readonly Item[],
    prefixOf: (item: Item) => string,
  ): Item[] {
    const own = renamed(base, mine, theirs, prefixOf);
    const [baseOf, mineOf, theirsOf] = [byId(base), byId(own), byId(theirs)];
    const ids = joinedOrder(base, own, theirs);
    return ids.flatMap((id) => {
      const at = `${name}.${id}`;
      const [was, my, their] = [baseOf.get(id), mineOf.get(id), theirsOf.get(id)];
      if (was && my && their) return [{ ...this.fields(was, my, their, at, nameOf(my, id)), id }];
      if (!was) return my ?? their ?? [];
      const kept = this.value(was, my, their, at, nameOf(was, id), '') as Item | undefined;
      return kept ?? [];
    });
  }

  private value(
    base: unknown,
    mine: unknown,
    theirs: unknown,
    key: string,
    where: string,
    field: string,
  ): unknown {
    if (isSame(mine, theirs) || isSame(theirs, base)) return mine;
    if (isSame(mine, base)) return theirs;
    this.conflicts.push({ key, where, field, mine, theirs });
    return this.choices.get(key) === 'theirs' ? theirs : mine;
  }
}

function byId(items: readonly Item[]): Map<string, Item> {
  return new Map(items.map((item) => [item.id, item]));
}

function nameOf(item: Item, id: string): string {
  const words = item['label'] ?? item['title'];
  return typeof words === 'string' ? `${id}, ${words}` : id;
}

/** Two people may each have added a T4: theirs keeps the id, mine takes the next free one. */
function renamed(
  base: readonly Item[],
  mine: readonly Item[],
  theirs: readonly Item[],
  prefixOf: (item: Item) => string,
): readonly Item[] {
  const before = byId(base);
  const other = byId(theirs);
  const taken = new Set([...other.keys(), ...mine.map((item) => item.id)]);
  return mine.map((item) => {
    const twin = other.get(item.id);
    const clash = twin !== undefined && !before.has(item.id) && !isSame(twin, item);
    return clash ? { ...item, id: freeId(prefixOf(item), taken) } : item;
  });
}

/** The order of the side that moved something (mine where both did); what only the other side has follows its neighbour. */
function joinedOrder(base: readonly Item[], mine: readonly Item[], theirs: readonly Item[]): string[] {
  const lead = isReordered(base, mine) ? mine : theirs;
  const other = lead === mine ? theirs : mine;
  const ids = lead.map((item) => item.id);
  other.forEach((item, i) => {
    if (ids.includes(item.id)) return;
    const before = other
      .slice(0, i)
      .reverse()
      .find((each) => ids.includes(each.id));
    ids.splice(before ? ids.indexOf(before.id) + 1 : 0, 0, item.id);
  });
  return ids;
}

function isReordered(base: readonly Item[], side: readonly Item[]): boolean {
  const kept = new Set(side.map((item) => item.id));
  const common = base.map((item) => item.id).filter((id) => kept.has(id));
  const known = new Set(common);
  return !isSame(
    side.map((item) => item.id).filter((id) => known.has(id)),
    common,
  );
}
