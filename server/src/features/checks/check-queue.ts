import { problems } from '../../platform/http';

interface Waiting {
  readonly key: string | undefined;
  readonly person: string;
  /** Raised when a newer one takes its place while it runs. */
  readonly flag: Int32Array<SharedArrayBuffer>;
  run(): void;
  drop(reason: Error): void;
}

/**
 * Who is checked next: at most `width` at once and two a person; where the same person checks the same channel again, the
 * one that still waits is dropped, and the one that runs sees its flag raised and leaves off by itself: aborting it would end
 * its thread and its caches.
 */
export class CheckQueue {
  private readonly waiting: Waiting[] = [];
  private readonly underWay = new Set<Waiting>();
  private readonly running = new Map<string, number>();
  private active = 0;

  constructor(
    private readonly width: number,
    private readonly mostPerPerson = 2,
  ) {}

  /** @param key what a later one replaces; undefined for one that is never replaced */
  add<Result>(
    person: string,
    key: string | undefined,
    work: (flag: Waiting['flag']) => Promise<Result>,
  ): Promise<Result> {
    return new Promise<Result>((resolve, reject) => {
      if (key !== undefined) this.replace(key);
      const entry: Waiting = {
        key,
        person,
        flag: new Int32Array(new SharedArrayBuffer(4)),
        run: () =>
          void work(entry.flag)
            .then(resolve, reject)
            .finally(() => this.finished(entry)),
        drop: reject,
      };
      this.waiting.push(entry);
      this.next();
    });
  }

  private replace(key: string): void {
    const at = this.waiting.findIndex((entry) => entry.key === key);
    if (at >= 0) this.waiting.splice(at, 1)[0]!.drop(problems.superseded());
    for (const entry of this.underWay) if (entry.key === key) Atomics.store(entry.flag, 0, 1);
  }

  private next(): void {
    while (this.active < this.width) {
      const at = this.waiting.findIndex(
        (entry) => (this.running.get(entry.person) ?? 0) < this.mostPerPerson,
      );
      if (at < 0) return;
      const [entry] = this.waiting.splice(at, 1);
      this.active += 1;
      this.underWay.add(entry!);
      this.running.set(entry!.person, (this.running.get(entry!.person) ?? 0) + 1);
      entry!.run();
    }
  }

  private finished(entry: Waiting): void {
    const { person } = entry;
    this.active -= 1;
    this.underWay.delete(entry);
    const left = (this.running.get(person) ?? 1) - 1;
    if (left > 0) this.running.set(person, left);
    else this.running.delete(person);
    this.next();
  }
}
