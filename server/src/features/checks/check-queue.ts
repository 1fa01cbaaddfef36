import { problems } from '../../platform/http';

interface Waiting {
  readonly key: string | undefined;
  readonly person: string;
  run(): void;
  drop(reason: Error): void;
}

/**
 * Who is checked next: at most `width` at once and two a person; where the same person checks the same channel again, the
 * one that still waits is dropped. A running check is never aborted, because that would end its thread and its caches.
 */
export class CheckQueue {
  private readonly waiting: Waiting[] = [];
  private readonly running = new Map<string, number>();
  private active = 0;

  constructor(
    private readonly width: number,
    private readonly mostPerPerson = 2,
  ) {}

  /** @param key what a later one replaces; undefined for one that is never replaced */
  add<Result>(person: string, key: string | undefined, work: () => Promise<Result>): Promise<Result> {
    return new Promise<Result>((resolve, reject) => {
      if (key !== undefined) this.replace(key);
      this.waiting.push({
        key,
        person,
        run: () =>
          void work()
            .then(resolve, reject)
            .finally(() => this.finished(person)),
        drop: reject,
      });
      this.next();
    });
  }

  private replace(key: string): void {
    const at = this.waiting.findIndex((entry) => entry.key === key);
    if (at >= 0) this.waiting.splice(at, 1)[0]!.drop(problems.superseded());
  }

  private next(): void {
    while (this.active < this.width) {
      const at = this.waiting.findIndex(
        (entry) => (this.running.get(entry.person) ?? 0) < this.mostPerPerson,
      );
      if (at < 0) return;
      const [entry] = this.waiting.splice(at, 1);
      this.active += 1;
      this.running.set(entry!.person, (this.running.get(entry!.person) ?? 0) + 1);
      entry!.run();
    }
  }

  private finished(person: string): void {
    this.active -= 1;
    const left = (this.running.get(person) ?? 1) - 1;
    if (left > 0) this.running.set(person, left);
    else this.running.delete(person);
    this.next();
  }
}
