import type { ChannelResponse, PartFacts, Signaling, Stackup } from '@tollgate/contracts';
import type { TouchstoneFile } from '@tollgate/touchstone';

/** A measured or supplied part with the hash of its bytes; found by the element's `file` or `fileId`. */
export interface ElementPart {
  readonly sha256: string;
  readonly file: TouchstoneFile;
}

/** What an element is built in: 2 ports (near, far) or 4 (near p, near n, far p, far n), all at one real reference. */
export interface BuildContext {
  readonly signaling: Signaling;
  /** Reference of every port in ohm, real, above 0. */
  readonly jointOhm: number;
  readonly stackup?: Stackup;
  readonly parts: ReadonlyMap<string, ElementPart>;
}

/** What is wrong with an element: where inside it, what, and how to mend it. */
export interface ElementProblem {
  readonly path: string;
  readonly message: string;
  readonly mend: string;
}

export class ElementError extends Error {
  constructor(readonly problem: ElementProblem) {
    super(`${problem.path}: ${problem.message} ${problem.mend}`);
    this.name = 'ElementError';
  }
}

/** The band in which a part can answer; `what` names it in a reason. */
export interface ElementCoverage {
  readonly fromHz: number;
  readonly toHz: number;
  readonly what: string;
}

/** Modes of a trace as the response's `lines` tell them. */
export type LineFacts = ChannelResponse['lines'][number]['modes'];

export interface BuiltElement {
  /** Point-major scattering parameters at `jointOhm`. */
  readonly s: Float64Array;
  readonly warnings: readonly string[];
  /** Touchstone parts only. */
  readonly part?: Omit<PartFacts, 'element'>;
  /** Traces only. */
  readonly line?: LineFacts;
}

/** Writes one point of a two-port to out[at..at+7]. */
export type PointWriter = (out: Float64Array, at: number, frequencyHz: number) => void;
