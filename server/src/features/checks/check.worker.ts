import { createHash } from 'node:crypto';
import {
  CheckAbandoned,
  canonicalBytes,
  checkChannel,
  createCheckCache,
  engineVersion,
  toResponse,
  toView,
  type Part,
} from '@tollgate/budget';
import type { CheckView } from '@tollgate/contracts';
import { solvedSectionOf, takeInSolved, type SolvedSection } from '@tollgate/elements';
import { FileStore } from '../../platform/files';
import { readParsed } from '../files/part-store';
import type { CheckSummary, CheckTask, TaskPart, TaskResult } from './check-task';

/** Parsed parts this thread holds, the longest unused in front. */
const held = new Map<string, Part>();
const mostHeld = 32;
const cache = createCheckCache();

/** Runs one check in a worker thread: parts from disk or memory, the engine, and the reply as JSON. */
export default async function runCheck(task: CheckTask): Promise<TaskResult> {
  const store = new FileStore(task.dataDirectory);
  const parts = new Map<string, Part>();
  task.sections.known.forEach(takeInSolved);
  for (const part of task.parts) parts.set(part.key, await hold(store, part));
  try {
    return outcomeOf(task, parts);
  } catch (error) {
    if (error instanceof CheckAbandoned) return { ok: false, superseded: true };
    throw error;
  }
}

function outcomeOf(task: CheckTask, parts: ReadonlyMap<string, Part>): TaskResult {
  const abandoned = () => Atomics.load(task.flag, 0) !== 0;
  const result = checkChannel(task.channel, parts, { cache, abandoned });
  if (!result.ok) return { ...result, superseded: false };
  const fingerprint = createHash('sha256').update(canonicalBytes(task.channel, parts)).digest('hex');
  const view = toView(result.check, fingerprint);
  const json = JSON.stringify(task.form === 'view' ? view : toResponse(result.check, fingerprint));
  const outcome = { fingerprint, engine: engineVersion, summary: summaryOf(view), json };
  return { ok: true, outcome, solved: solvedOf(task) };
}

/** The check has solved them: they are only read here. */
function solvedOf({ channel, sections }: CheckTask): SolvedSection[] {
  return sections.wanted.flatMap((i) => {
    const element = channel.elements[i];
    return element?.kind === 'trace' ? [solvedSectionOf(channel.stackup, element)] : [];
  });
}

async function hold(store: FileStore, { sha256, name }: TaskPart): Promise<Part> {
  const known = held.get(sha256);
  const part = known ?? { sha256, file: await readParsed(store, sha256, name) };
  held.delete(sha256);
  held.set(sha256, part);
  if (held.size > mostHeld) held.delete(held.keys().next().value!);
  return part;
}

function summaryOf(view: CheckView): CheckSummary {
  const worst = view.limits.find((limit) => limit.id === view.worstLimitId);
  return {
    verdict: view.verdict,
    worstMarginDb: view.worstMarginDb,
    worstLimitTitle: worst?.title ?? null,
    worstLimitStatus: worst?.status ?? null,
    worstFrequencyHz: view.worstFrequencyHz,
    weakestStanding: view.weakestStanding,
  };
}
