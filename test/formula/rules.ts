/** Step functions, dates and choices in other words: what steps.test.ts holds them to. */

const DAY = 86_400_000;
/** In the 1900 date system serial 61 is 1 March 1900. */
const SERIAL_0 = Date.UTC(1900, 2, 1) / DAY - 61;

function calendar(x: number): Date {
  return new Date((Math.floor(x) + SERIAL_0) * DAY);
}

/** Decimal rounding by text, independent of multiplying and dividing. */
function cut(x: number, digits: number): number {
  const [whole, part = ''] = x.toFixed(10).split('.');
  return Number(`${whole}.${part.slice(0, digits)}`);
}

/** Formula, its definition in other words, least x, largest x. */
export const RULES: readonly (readonly [string, (x: number) => number, number, number])[] = [
  ['INT(x)', (x) => x - (((x % 1) + 1) % 1), -40, 40],
  ['TRUNC(x)', (x) => x - (x % 1), -40, 40],
  ['TRUNC(x,2)', (x) => cut(x, 2), 0, 9],
  ['ROUND(x,0)', (x) => Math.sign(x) * Math.floor(Math.abs(x) + 0.5), -40, 40],
  ['ROUND(x,2)', (x) => Number(x.toFixed(2)), -5, 5],
  ['ROUND(x,-1)', (x) => 10 * Math.round(x / 10), 0, 900],
  ['ROUNDUP(x,1)', (x) => Math.sign(x) * (cut(Math.abs(x), 1) + 0.1), -7, 7],
  ['ROUNDDOWN(x,1)', (x) => Math.sign(x) * cut(Math.abs(x), 1), -7, 7],
  ['FLOOR(x,0.25)', (x) => Math.floor(4 * x) / 4, -9, 9],
  ['CEILING(x,0.25)', (x) => Math.ceil(4 * x) / 4, -9, 9],
  ['FLOOR.MATH(x,4)', (x) => 4 * Math.floor(x / 4), -90, 90],
  ['FLOOR.MATH(x,4,1)', (x) => 4 * Math.trunc(x / 4), -90, 90],
  ['CEILING.MATH(x,-4)', (x) => 4 * Math.ceil(x / 4), -90, 90],
  ['CEILING.MATH(x,4,1)', (x) => 4 * Math.sign(x) * Math.ceil(Math.abs(x) / 4), -90, 90],
  ['MOD(x,3)', (x) => ((x % 3) + 3) % 3, -40, 40],
  ['MOD(x,-3)', (x) => -(((-x % 3) + 3) % 3), -40, 40],
  ['YEAR(x)', (x) => calendar(x).getUTCFullYear(), 61, 200_000],
  ['MONTH(x)', (x) => calendar(x).getUTCMonth() + 1, 61, 200_000],
  ['DAY(x)', (x) => calendar(x).getUTCDate(), 61, 200_000],
  ['WEEKDAY(x)', (x) => calendar(x).getUTCDay() + 1, 61, 200_000],
  ['WEEKDAY(x,2)', (x) => ((calendar(x).getUTCDay() + 6) % 7) + 1, 61, 200_000],
  ['WEEKDAY(x,3)', (x) => (calendar(x).getUTCDay() + 6) % 7, 61, 200_000],
  ['WEEKDAY(x,13)', (x) => ((calendar(x).getUTCDay() + 4) % 7) + 1, 61, 200_000],
  ['DATE(2027,2,x)', (x) => Date.UTC(2027, 1, Math.floor(x)) / DAY - SERIAL_0, -400, 400],
  ['DATE(2027,x,15)', (x) => Date.UTC(2027, Math.floor(x) - 1, 15) / DAY - SERIAL_0, -90, 90],
  ['DATE(x,2,29)', (x) => Date.UTC(Math.floor(x), 1, 29) / DAY - SERIAL_0, 1900, 2400],
  ['IFS(x<1,2,x<3,5,TRUE,7)', (x) => (x < 1 ? 2 : x < 3 ? 5 : 7), -1, 5],
  ['SWITCH(INT(x),1,4,2,9,0)', (x) => ({ 1: 4, 2: 9 })[Math.floor(x)] ?? 0, 0, 4],
  ['CHOOSE(x,5,6,x*x)', (x) => [5, 6, x * x][Math.floor(x) - 1]!, 1, 3.999],
  ['MEDIAN(2,x,4)', (x) => Math.min(4, Math.max(2, x)), 0, 6],
  [
    'MEDIAN(1,x,5,9)',
    (x) => (Math.min(9, Math.max(5, x)) + Math.min(5, Math.max(1, x))) / 2,
    -2,
    12,
  ],
  ['MEDIAN({7,1,3},3-x,x)', (x) => [7, 1, 3, 3 - x, x].sort((a, b) => a - b)[2]!, -9, 9],
];
