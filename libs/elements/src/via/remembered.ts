const most = 512;

/** Keeps what was solved by what it was solved from; the oldest goes first. */
export function rememberer<Value>(): (key: string, make: () => Value) => Value {
  const kept = new Map<string, Value>();
  return (key, make) => {
    const known = kept.get(key);
    if (known !== undefined) return known;
    const made = make();
    if (kept.size >= most) kept.delete(kept.keys().next().value!);
    kept.set(key, made);
    return made;
  };
}
