import { Piscina } from 'piscina';
import canonicalize from 'canonicalize';
import {
  parseStackup,
  type CompleteStackup,
  type CrossSection,
  type CrossSectionRequest,
  type Synthesis,
  type SynthesisRequest,
} from '@tollgate/contracts';
import { ElementError, sectionKeyOf, type SolvedSection } from '@tollgate/elements';
import { problems, type Caller } from '../../platform/http';
import { errorFacts, log } from '../../platform/log';
import { workerFile } from '../../platform/threads';
import { CheckQueue, type SectionStore } from '../checks';
import type { DeskReply, DeskResult, DeskTask } from './desk-task';
import { below } from './stackups.service';

const mostRemembered = 500;

/**
 * The cross-section desk. A question is answered from memory where it was asked before, else in a thread of its own that
 * starts with the database's solution of the section; of one person's questions of a kind the latest counts.
 */
export class DeskService {
  private readonly pool = new Piscina<DeskTask, DeskResult<CrossSection | Synthesis>>({
    ...workerFile(import.meta.url, 'desk.worker'),
    minThreads: 0,
    maxThreads: 1,
    idleTimeout: 600_000,
  });
  private readonly queue = new CheckQueue(1);
  private readonly remembered = new Map<string, CrossSection | Synthesis>();

  constructor(private readonly sections: SectionStore) {
    // A thread that dies outside a task is replaced by the pool; without a listener it would take the process along.
    this.pool.on('error', (error: unknown) => log('error', 'desk thread', errorFacts(error)));
  }

  async section(caller: Caller, request: CrossSectionRequest): Promise<CrossSection> {
    const { stackup: document, sensitivities, ...input } = request;
    const stackup = readLayers(document);
    const known = await this.known(stackup, input);
    const task = { kind: 'section', stackup, input, sensitivities } as const;
    return this.answer(caller, sensitivities ? 'sensitivities' : 'section', task, { ...task, known });
  }

  async synthesis(caller: Caller, request: SynthesisRequest): Promise<Synthesis> {
    const { stackup, ...wanted } = request;
    return this.answer(caller, 'synthesis', { kind: 'synthesis', stackup: readLayers(stackup), wanted });
  }

  async stop(): Promise<void> {
    await this.pool.destroy();
  }

  private async answer<Task extends DeskTask>(
    caller: Caller,
    what: string,
    task: Task,
    /** The question with what helps to answer it. */
    helped: DeskTask = task,
  ): Promise<DeskReply<Task>> {
    const key = canonicalize(task)!;
    const before = this.remembered.get(key);
    if (before) return before as DeskReply<Task>;
    const run = () => this.pool.run(helped);
    const result = await this.queue.add(caller.id, `${caller.id}:${what}`, run);
    if (!result.ok) throw problems.unprocessable(result.problems);
    this.remember(key, result.reply);
    await this.sections.keep([result.solved]);
    return result.reply as DeskReply<Task>;
  }

  private async known(
    stackup: CompleteStackup,
    input: Parameters<typeof sectionKeyOf>[1],
  ): Promise<SolvedSection | undefined> {
    try {
      return await this.sections.find(sectionKeyOf(stackup, input));
    } catch (error) {
      if (error instanceof ElementError) throw problems.unprocessable([error.problem]);
      throw error;
    }
  }

  private remember(key: string, reply: CrossSection | Synthesis): void {
    this.remembered.set(key, reply);
    if (this.remembered.size > mostRemembered) this.remembered.delete(this.remembered.keys().next().value!);
  }
}

/** Layers that have their shape; whether a trace can run on them, its section says. */
function readLayers(document: unknown): CompleteStackup {
  const parsed = parseStackup(document);
  if (!parsed.ok) throw problems.unprocessable(below('stackup', parsed.problems));
  return parsed.stackup;
}
