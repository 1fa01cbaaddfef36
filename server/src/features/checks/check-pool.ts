import { Piscina } from 'piscina';
import { problems } from '../../platform/http';
import { errorFacts, log } from '../../platform/log';
import { workerFile } from '../../platform/threads';
import { CheckQueue } from './check-queue';
import type { CheckOutcome, CheckTask, TaskResult } from './check-task';
import type { FieldProblem } from '@tollgate/contracts';
import type { SectionStore } from './section-store';

/** The document is well formed and cannot be checked as it stands. */
export class Uncheckable extends Error {
  constructor(readonly problems: readonly FieldProblem[]) {
    super('The channel cannot be checked as it stands.');
  }
}

const mostRemembered = 64;

/** The threads that check, and the latest outcomes by fingerprint. */
export class CheckPool {
  private readonly pool: Piscina<CheckTask, TaskResult>;
  private readonly queue: CheckQueue;
  private readonly remembered = new Map<string, CheckOutcome>();

  constructor(
    threads: number,
    private readonly sections: SectionStore,
  ) {
    this.pool = new Piscina<CheckTask, TaskResult>({
      ...workerFile(import.meta.url, 'check.worker'),
      minThreads: 1,
      maxThreads: threads,
      idleTimeout: 600_000,
    });
    // A thread that dies outside a task is replaced by the pool; without a listener it would take the process along.
    this.pool.on('error', (error: unknown) => log('error', 'check thread', errorFacts(error)));
    this.queue = new CheckQueue(threads);
  }

  /** @throws Uncheckable with paths in the channel; HttpProblem superseded where a newer check took the place */
  async run(
    person: string,
    key: string | undefined,
    task: Omit<CheckTask, 'flag' | 'sections'>,
  ): Promise<CheckOutcome> {
    const result = await this.queue.add(person, key, (flag) => this.solve({ ...task, flag }));
    if (!result.ok) throw result.superseded ? problems.superseded() : new Uncheckable(result.problems);
    if (task.form === 'view') this.remember(result.outcome);
    return result.outcome;
  }

  /** Looks up what is solved already once the check's turn has come, so that the order of checks stays that of asking. */
  private async solve(task: Omit<CheckTask, 'sections'>): Promise<TaskResult> {
    const sections = await this.sections.helpFor(task.channel);
    const result = await this.pool.run({ ...task, sections });
    if (result.ok) await this.sections.keep(result.solved);
    return result;
  }

  /** An outcome of before with the same inputs, which are then the same bytes. */
  recall(fingerprint: string): CheckOutcome | undefined {
    return this.remembered.get(fingerprint);
  }

  async stop(): Promise<void> {
    await this.pool.destroy();
  }

  private remember(outcome: CheckOutcome): void {
    this.remembered.delete(outcome.fingerprint);
    this.remembered.set(outcome.fingerprint, outcome);
    if (this.remembered.size > mostRemembered) this.remembered.delete(this.remembered.keys().next().value!);
  }
}
