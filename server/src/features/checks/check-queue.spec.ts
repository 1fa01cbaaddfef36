import { CheckQueue } from './check-queue';

/** Work that ends when it is told to. */
function controlled() {
  let end: (value: string) => void = () => undefined;
  const done = new Promise<string>((resolve) => (end = resolve));
  return { done, end };
}

describe('the queue of checks', () => {
  it('drops the one that waits when the same person checks the same channel again', async () => {
    const queue = new CheckQueue(1);
    const first = controlled();
    const running = queue.add('a', 'a:x', () => first.done);
    const waiting = queue.add('a', 'a:x', () => Promise.resolve('second'));
    const latest = queue.add('a', 'a:x', () => Promise.resolve('third'));
    await expect(waiting).rejects.toMatchObject({ id: 'superseded' });
    first.end('first');
    expect(await running).toBe('first');
    expect(await latest).toBe('third');
  });

  it('raises the flag of the one that runs, and leaves other channels alone', async () => {
    const queue = new CheckQueue(2);
    const flags: Int32Array[] = [];
    const [one, other] = [controlled(), controlled()];
    const running = queue.add('a', 'a:x', (flag) => (flags.push(flag), one.done));
    const elsewhere = queue.add('b', 'b:x', (flag) => (flags.push(flag), other.done));
    const latest = queue.add('a', 'a:x', () => Promise.resolve('latest'));
    expect(flags.map((flag) => Atomics.load(flag, 0))).toEqual([1, 0]);
    one.end('one');
    other.end('other');
    await Promise.all([running, elsewhere, latest]);
  });

  it('runs two of one person at once, and lets another person by', async () => {
    const queue = new CheckQueue(3);
    const started: string[] = [];
    const held = [controlled(), controlled()];
    const mine = held.map(({ done }, i) => queue.add('a', undefined, () => (started.push(`a${i}`), done)));
    const third = queue.add('a', undefined, () => (started.push('a2'), Promise.resolve('third')));
    const theirs = queue.add('b', undefined, () => (started.push('b'), Promise.resolve('theirs')));
    expect(started).toEqual(['a0', 'a1', 'b']);
    held.forEach(({ end }) => end('done'));
    await Promise.all([...mine, third, theirs]);
    expect(started).toEqual(['a0', 'a1', 'b', 'a2']);
  });
});
