/**
 * The elementary functions on which drawn values and decisions depend.
 *
 * `Math.exp` and its relatives differ in the last bit between engines, so these
 * come from @stdlib's pure JavaScript (pinned versions: another version may round
 * another way and so change a draw). ERROR_ULPS bounds their error; it is at least
 * twice the largest error that test/numeric/elementary.test.ts measures.
 */
import atanOf from '@stdlib/math-base-special-atan';
import cosOf from '@stdlib/math-base-special-cos';
import expOf from '@stdlib/math-base-special-exp';
import lnOf from '@stdlib/math-base-special-ln';
import powOf from '@stdlib/math-base-special-pow';
import sinOf from '@stdlib/math-base-special-sin';
import tanOf from '@stdlib/math-base-special-tan';
import tanhOf from '@stdlib/math-base-special-tanh';

export const exp: (x: number) => number = expOf;
export const ln: (x: number) => number = lnOf;
export const sin: (x: number) => number = sinOf;
export const cos: (x: number) => number = cosOf;
export const tan: (x: number) => number = tanOf;
export const atan: (x: number) => number = atanOf;
export const tanh: (x: number) => number = tanhOf;
export const pow: (x: number, y: number) => number = powOf;

/** Error bound of all of the above, in units in the last place; of `pow` up to the power below. */
export const ERROR_ULPS = 4;
/** Beyond this power `pow` takes its logarithm from a product that is rounded once. */
export const LARGE_POWER = 2147483648;
/** Error bound of `pow` there: 2^-53 of an exponent of at most 1075 binary digits is 745 ulps, doubled and more. */
export const LARGE_POWER_ERROR_ULPS = 2048;
/** Beyond this size of argument the waves are not trusted: their enclosure is [−1, 1]. */
export const WAVE_LIMIT = 1e15;
