/** The engine's worksheet functions: cells in, cells out, for every face. */
export type { Cell, ErrorCell, Range } from './density/cells';
export { CellErrorPassed, InputError } from './errors';
export { acceptance } from './worksheet/acceptance';
export { blend } from './worksheet/blend';
export { cases } from './worksheet/cases';
export { draw } from './worksheet/draw';
export { each } from './worksheet/each';
export { envelope } from './worksheet/envelope';
export { expect } from './worksheet/expect';
export { fromBins, fromData, fromPercentiles } from './worksheet/histogram';
export { pick } from './worksheet/pick';
export { profile } from './worksheet/profile';
export { proposals } from './worksheet/proposals';
export { above, below, quantile } from './worksheet/shares';
export { stratified } from './worksheet/stratified';
export { thin } from './worksheet/thin';
