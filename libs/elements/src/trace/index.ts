export { legLengths } from './legs-of-path';
export { padProblems, padsInto } from './pads';
export { traceStanding } from './standing';
export { buildTrace, traceDelayS, traceProblems, traceTollDb } from './trace';
