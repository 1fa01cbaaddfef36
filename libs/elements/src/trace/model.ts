import type { LineMode, ModeName } from '@tollgate/lines';
import { estimateLine } from './estimate';
import type { TraceSection } from './section';

/** A trace's modes over frequency, and what a person should know of them. */
export interface TraceModel {
  readonly modes: Partial<Record<ModeName, LineMode>>;
  readonly standing: 'solved' | 'estimated' | 'assumed';
  /** The publication or solver the numbers come from. */
  readonly source: string;
  readonly cautions: readonly string[];
}

/**
 * The model of record of a trace.
 * @throws LineError where nothing covers the section
 */
export function modelTrace(section: TraceSection, frequenciesHz: Float64Array): TraceModel {
  return estimateLine(section, frequenciesHz);
}
