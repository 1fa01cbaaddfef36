export { legLengths } from './legs-of-path';
export { traceStanding } from './standing';
export { buildTrace, traceDelayS, traceProblems, traceTollDb } from './trace';
