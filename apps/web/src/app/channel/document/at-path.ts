/** Where a value stands inside an object: `['near', 'resistanceOhm']`; numbers are places in a list. */
export type Path = readonly (string | number)[];

type Holder = Record<string | number, unknown>;

export function valueAt(root: unknown, path: Path): unknown {
  return path.reduce<unknown>(
    (holder, key) => (typeof holder === 'object' && holder !== null ? (holder as Holder)[key] : undefined),
    root,
  );
}

/** The same object with one value changed; everything else is shared. `undefined` takes the field away. */
export function withValue<Root>(root: Root, path: Path, value: unknown): Root {
  const [key, ...rest] = path;
  if (key === undefined) return value as Root;
  const inner = rest.length === 0 ? value : withValue((root as Holder | undefined)?.[key] ?? {}, rest, value);
  if (Array.isArray(root)) return root.map((each: unknown, i) => (i === key ? inner : each)) as Root;
  const copy: Holder = { ...(root as Holder) };
  if (inner === undefined) delete copy[key];
  else copy[key] = inner;
  return copy as Root;
}

/** `elements[2].lengthM`, as the server names a place. */
export function pathText(path: Path): string {
  return path.reduce<string>(
    (text, key) => (typeof key === 'number' ? `${text}[${key}]` : text === '' ? key : `${text}.${key}`),
    '',
  );
}
