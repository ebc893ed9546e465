/**
 * The worksheet functions as the workbook sees them. Each comment is the help that
 * the workbook shows, and functions.json is generated from it (npm run generate),
 * so types and comments keep to what that generator reads. The bodies only hand
 * over; conversion of cells and errors is in host.ts, the work in src/.
 */
import { answer, answerLater } from './host';

/**
 * Draws random values that follow the density exactly: one column for each label, or for each of several variables, the same values until an input changes. In the unit of x. With a step in limits the values are counted: from, from + step and so on; for a short list of values with weights in cells PICK is simpler.
 * @customfunction DRAW
 * @cancelable
 * @param density What is likely: a formula in x such as EXP(-0.5*((x-4)/1.3)^2), or in several variables such as AND(early+late<=90,early*late>=400), a table of points (x and height, straight lines between), a block of two columns that names density, from, to, rows, seed, label and constants, or a list with a heading row (label, density, from, to and so on) and one input a line. Heights need no particular unit.
 * @param limits Two cells, from and to, in the unit of x; or a row for each variable: its name, from, to and, for a counted one, the step. A table has its own ends, a block may name from, to and step.
 * @param rows How many values, 1 to 1048575, or two cells: first row and last row. Needed unless a block has them.
 * @param seed Any text or number except blank and 0. The same seed gives the same values. Needed unless a block has it.
 * @param label Name of the quantity. Each label has its own random numbers; a row of labels draws one column for each. Needed unless a block has it.
 * @param givens What the names in the formula stand for, one range each: two columns name and value; a table with headings whose columns are functions such as base(x); or a column of numbers below its name.
 * @param invocation The call itself.
 */
export function draw(
  density: any[][],
  limits?: any[][],
  rows?: any[][],
  seed?: any[][],
  label?: any[][],
  givens?: any[][][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater('DRAW', [density, limits, rows, seed, label], givens, invocation);
}

/**
 * Lists the pieces of the proved envelope: in each piece the density lies on or below the upper line and on or above the lower line. A heading row, then one row a piece: from and to in the unit of x, four heights, share of proposals and acceptance as fractions of 1.
 * @customfunction ENVELOPE
 * @cancelable
 * @param density What is likely: a formula in x, a table of points (x and height), or a block of two columns that names density, from, to and constants.
 * @param limits Two cells, from and to, in the unit of x; or a row for each variable: its name, from, to and, for a counted one, the step. A table has its own ends, a block may name from, to and step.
 * @param givens What the names in the formula stand for, one range each: two columns name and value; a table with headings whose columns are functions such as base(x); or a column of numbers below its name.
 * @param invocation The call itself.
 */
export function envelope(
  density: any[][],
  limits?: any[][],
  givens?: any[][][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater('ENVELOPE', [density, limits], givens, invocation);
}

/**
 * Tells how the draws were made and whether that went as proved: inputs as read, proof, proposals, acceptance, test of the count, notes. Two columns: item and value.
 * @customfunction ACCEPTANCE
 * @cancelable
 * @param density What is likely: a formula in x, a table of points (x and height), a block of two columns, or a list of one input a line. Give the same cells as to DRAW.
 * @param limits Two cells, from and to, in the unit of x; or a row for each variable: its name, from, to and, for a counted one, the step. A table has its own ends, a block may name from, to and step.
 * @param rows How many values, 1 to 1048575, or two cells: first row and last row. Give the same as to DRAW.
 * @param seed Seed of the draws. Give the same as to DRAW.
 * @param label Label of the draws. Give the same as to DRAW.
 * @param givens What the names in the formula stand for, one range each: two columns name and value; a table with headings whose columns are functions such as base(x); or a column of numbers below its name.
 * @param invocation The call itself.
 */
export function acceptance(
  density: any[][],
  limits?: any[][],
  rows?: any[][],
  seed?: any[][],
  label?: any[][],
  givens?: any[][][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater('ACCEPTANCE', [density, limits, rows, seed, label], givens, invocation);
}

/**
 * Gives evenly spaced points for a chart: the density scaled to area 1, with the proved lines above and below it and the share of the area below x. A heading row, then one row a point: x in its unit, heights in share per unit of x, the last column as fraction of 1. Of a counted quantity a row for each value, at most count of them: density is the value's share, and share below leaves the value itself out.
 * @customfunction PROFILE
 * @param density What is likely: a formula in x, a table of points (x and height), or a block of two columns that names density, from, to and constants.
 * @param limits Two cells, from and to, in the unit of x; or one row: x, from, to and, for a counted quantity, the step. A table has its own ends, a block may name from, to and step.
 * @param count How many points, 2 to 100000. Left out: 201.
 * @param givens What the names in the formula stand for, one range each: two columns name and value; a table with headings whose columns are functions such as base(x); or a column of numbers below its name.
 */
export function profile(
  density: any[][],
  limits?: any[][],
  count?: any[][],
  givens?: any[][][],
): any[][] {
  return answer('PROFILE', [density, limits, count], givens);
}

/**
 * Gives the exact share of the density's area below each x, as fraction of 1: the chance that a draw is below it. Of a counted quantity the value x itself is neither below nor above. The result has the shape of x.
 * @customfunction BELOW
 * @cancelable
 * @param density What is likely: a formula in x, a table of points (x and height), or a block of two columns that names density, from, to and constants.
 * @param limits Two cells, from and to, in the unit of x; or one row: x, from, to and, for a counted quantity, the step. A table has its own ends, a block may name from, to and step.
 * @param x A number or a range of numbers, in the unit of the density's x.
 * @param givens What the names in the formula stand for, one range each: two columns name and value; a table with headings whose columns are functions such as base(x); or a column of numbers below its name.
 * @param invocation The call itself.
 */
export function below(
  density: any[][],
  limits?: any[][],
  x?: any[][],
  givens?: any[][][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater('BELOW', [density, limits, x], givens, invocation);
}

/**
 * Gives the exact share of the density's area above each x, as fraction of 1: the chance that a draw is above it. Small shares keep their digits. Of a counted quantity the value x itself is neither below nor above. The result has the shape of x.
 * @customfunction ABOVE
 * @cancelable
 * @param density What is likely: a formula in x, a table of points (x and height), or a block of two columns that names density, from, to and constants.
 * @param limits Two cells, from and to, in the unit of x; or one row: x, from, to and, for a counted quantity, the step. A table has its own ends, a block may name from, to and step.
 * @param x A number or a range of numbers, in the unit of the density's x.
 * @param givens What the names in the formula stand for, one range each: two columns name and value; a table with headings whose columns are functions such as base(x); or a column of numbers below its name.
 * @param invocation The call itself.
 */
export function above(
  density: any[][],
  limits?: any[][],
  x?: any[][],
  givens?: any[][][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater('ABOVE', [density, limits, x], givens, invocation);
}

/**
 * Gives the x that has each share of the density's area below it, or above it: 0.9 gives the value that nine draws in ten stay below. Of a counted quantity the first value that has the share together with all values before it. The result has the shape of share, in the unit of x.
 * @customfunction QUANTILE
 * @cancelable
 * @param density What is likely: a formula in x, a table of points (x and height), or a block of two columns that names density, from, to and constants.
 * @param limits Two cells, from and to, in the unit of x; or one row: x, from, to and, for a counted quantity, the step. A table has its own ends, a block may name from, to and step.
 * @param share A fraction from 0 to 1 or a range of them. 0 and 1 give the limits.
 * @param side below or above: on which side of x the share lies. Left out: below.
 * @param givens What the names in the formula stand for, one range each: two columns name and value; a table with headings whose columns are functions such as base(x); or a column of numbers below its name.
 * @param invocation The call itself.
 */
export function quantile(
  density: any[][],
  limits?: any[][],
  share?: any[][],
  side?: any[][],
  givens?: any[][][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater('QUANTILE', [density, limits, share, side], givens, invocation);
}

/**
 * Gives the exact mean of a quantity under the density, with proved bounds: the mean that many draws tend to. A heading row, then value, at least and at most in the unit of the quantity.
 * @customfunction EXPECT
 * @cancelable
 * @param density What is likely: a formula in x, a table of points (x and height), or a block of two columns that names density, from, to and constants.
 * @param limits Two cells, from and to, in the unit of x; or a row for each variable: its name, from, to and, for a counted one, the step. A table has its own ends, a block may name from, to and step.
 * @param quantity A formula in x, such as x, x^2, MAX(0,x-60), or x>80 for a chance.
 * @param givens What the names in the formula stand for, one range each: two columns name and value; a table with headings whose columns are functions such as base(x); or a column of numbers below its name.
 * @param invocation The call itself.
 */
export function expect(
  density: any[][],
  limits?: any[][],
  quantity?: any[][],
  givens?: any[][][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater('EXPECT', [density, limits, quantity], givens, invocation);
}

/**
 * Lists every proposal behind the draws of DRAW with the same cells, kept or not. A heading row, then one row a proposal: row, attempt, value in the unit of x, height drawn (none is needed under the lower line), density there, kept as TRUE or FALSE.
 * @customfunction PROPOSALS
 * @cancelable
 * @param density What is likely: a formula in x, a table of points (x and height), or a block of two columns. Give the same cells as to DRAW.
 * @param limits Two cells, from and to, in the unit of x; or a row for each variable: its name, from, to and, for a counted one, the step. A table has its own ends, a block may name from, to and step.
 * @param rows How many values, 1 to 100000, or two cells: first row and last row.
 * @param seed Seed of the draws. Give the same as to DRAW.
 * @param label Label of the draws. Give the same as to DRAW.
 * @param givens Values for the names in the formula: two columns, name and value.
 * @param invocation The call itself.
 */
export function proposals(
  density: any[][],
  limits?: any[][],
  rows?: any[][],
  seed?: any[][],
  label?: any[][],
  givens?: any[][][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater('PROPOSALS', [density, limits, rows, seed, label], givens, invocation);
}

/**
 * Makes a table of points from a histogram: each bin gets its share of the area, whatever its width. A heading row, then x in the unit of the edges and height in share per unit of x. Give it to DRAW as density.
 * @customfunction FROMBINS
 * @param edges Edges of the bins, rising: one more than there are bins.
 * @param shares Share of each bin, 0 or more. Counts or percentages do as well: they are scaled to add up to 1.
 */
export function fromBins(edges: any[][], shares: any[][]): any[][] {
  return answer('FROMBINS', [edges, shares], null);
}

/**
 * Makes a table of points from judged percentiles, evenly spread between neighbours. A heading row, then x in the unit of the values and height in share per unit of x. Give it to DRAW as density.
 * @customfunction FROMPERCENTILES
 * @param levels Levels as fractions between 0 and 1, rising, such as 0.1, 0.5, 0.9.
 * @param values The value that is not exceeded with each of these chances, rising.
 * @param lowest The least that can happen, below the first value.
 * @param highest The most that can happen, above the last value.
 */
export function fromPercentiles(
  levels: any[][],
  values: any[][],
  lowest: any[][],
  highest: any[][],
): any[][] {
  return answer('FROMPERCENTILES', [levels, values, lowest, highest], null);
}

/**
 * Makes a table of points from data: a histogram with bins of width 2 IQR / n^(1/3) (Freedman and Diaconis 1981), or 1 + log2 n bins (Sturges 1926) when the middle half of the values are all alike. A heading row, then x in the unit of the values and height in share per unit of x. Give it to DRAW as density.
 * @customfunction FROMDATA
 * @param values One row or column of numbers. A blank counts as 0.
 * @param lowest Where the first bin begins. Left out: the least value.
 * @param highest Where the last bin ends. Left out: the largest value.
 */
export function fromData(values: any[][], lowest?: any[][], highest?: any[][]): any[][] {
  return answer('FROMDATA', [values, lowest, highest], null);
}

/**
 * Blends shapes by shares of the area, whatever their heights: 0.9 and 0.1 mean nine draws in ten from the first. Tables alone give a table of points; with a formula among them a block of two columns with density, from, to and constants. Give the result to DRAW as density.
 * @customfunction BLEND
 * @param shares Share of each shape as fraction of 1; they add up to 1.
 * @param shapes A table of points, or a block of two columns that names density, from, to and constants; one range for each share.
 */
export function blend(shares: any[][], shapes?: any[][][]): any[][] {
  return answer('BLEND', [shares], shapes);
}

/**
 * Draws one quantity under several cases, such as three numbers of presses: one column a case, every column with the random numbers of the same row, so that differences between cases are not noise. Each column is what DRAW gives with that case's values. A heading row of case names, then values in the unit of x.
 * @customfunction CASES
 * @param density What is likely: a formula in x, a table of points (x and height), or a block of two columns that names density, from, to, rows, seed, label and constants.
 * @param limits Two cells, from and to, in the unit of x; or one row: x, from, to and, for a counted quantity, the step. A table has its own ends, a block may name from, to and step.
 * @param rows How many values a case, 1 to 1048575, or two cells: first row and last row. Needed unless a block has them.
 * @param seed Any text or number except blank and 0. Needed unless a block has it.
 * @param label Name of the quantity, the same for all cases. Needed unless a block has it.
 * @param cases A heading row, any word and then the case names; below it one row for each name that differs: the name of a given, or from or to for the limits, then its value in each case.
 * @param givens Values for the names in the formula that are the same in all cases: two columns, name and value.
 */
export function cases(
  density: any[][],
  limits?: any[][],
  rows?: any[][],
  seed?: any[][],
  label?: any[][],
  cases?: any[][],
  givens?: any[][][],
): any[][] {
  return answer('CASES', [density, limits, rows, seed, label, cases], givens);
}

/**
 * Draws one value for each line of conditions, such as days in cold store given the harvest of the same row. Line i is row i of DRAW with that line's values, so columns that are drawn from one another stay paired row by row. In the unit of x.
 * @customfunction EACH
 * @cancelable
 * @param density What is likely under given conditions: a formula in x and names, a table of points (x and height), or a block of two columns that names density, from, to, seed, label and constants.
 * @param limits Two cells, from and to, in the unit of x, or names of givens. A table has its own ends, a block may name from and to.
 * @param seed Any text or number except blank and 0. Needed unless a block has it.
 * @param label Name of the quantity. Each label has its own random numbers. Needed unless a block has it.
 * @param lines A heading row of names (of givens, or from and to for the limits), then one line of values for each draw. At most 20000 different lines; equal ones count once.
 * @param givens Values for the names in the formula that are the same in all lines: two columns, name and value.
 * @param invocation The call itself.
 */
export function each(
  density: any[][],
  limits?: any[][],
  seed?: any[][],
  label?: any[][],
  lines?: any[][],
  givens?: any[][][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater('EACH', [density, limits, seed, label, lines], givens, invocation);
}

/**
 * Draws values as DRAW does, but spread evenly over the density, so that averages need far fewer rows. Each row alone is exactly distributed; rows are not independent, so intervals worked out from them are too wide, and the column as a whole changes with the number of rows. In the unit of x.
 * @customfunction STRATIFIED
 * @param density What is likely: a formula in x, a table of points (x and height), or a block of two columns that names density, from, to, rows, seed, label and constants.
 * @param limits Two cells, from and to, in the unit of x; or one row: x, from, to and, for a counted quantity, the step. A table has its own ends, a block may name from, to and step.
 * @param rows How many values, 1 to 1048575. Another number gives another column. Needed unless a block has it.
 * @param seed Any text or number except blank and 0. The same seed gives the same values. Needed unless a block has it.
 * @param label Name of the quantity. Each label has its own random numbers; a row of labels draws one column for each. Needed unless a block has it.
 * @param givens Values for the names in the formula: two columns, name and value.
 */
export function stratified(
  density: any[][],
  limits?: any[][],
  rows?: any[][],
  seed?: any[][],
  label?: any[][],
  givens?: any[][][],
): any[][] {
  return answer('STRATIFIED', [density, limits, rows, seed, label], givens);
}

/**
 * Draws as many values for each row as its count says, such as the losses of a season with that many events, and gives their total, the largest of them and the count. Raising one count only adds draws to that row; all other rows stay as they are. A heading row, then one row a count, in the unit of x (or of each). Without draws total and largest are 0.
 * @customfunction TOTAL
 * @cancelable
 * @param counts One column of whole numbers from 0 to 1000000, such as draws of a counted quantity; together at most 100000000.
 * @param density How large one of them is: a formula in x, a table of points (x and height), or a block of two columns that names density, from, to, seed, label and constants.
 * @param limits Two cells, from and to, in the unit of x; or one row: x, from, to and, for a counted quantity, the step. A table has its own ends, a block may name from, to and step.
 * @param each A formula in x that every draw is put through, such as MIN(x,50000) for a cover of at most 50000. Left out: x itself.
 * @param seed Any text or number except blank and 0. Needed unless a block has it.
 * @param label Name of the quantity. Each label has its own random numbers. Needed unless a block has it.
 * @param givens What the names in the formulas stand for, one range each: two columns name and value; a table with headings whose columns are functions such as base(x); or a column of numbers below its name.
 * @param invocation The call itself.
 */
export function total(
  counts: any[][],
  density: any[][],
  limits?: any[][],
  each?: any[][],
  seed?: any[][],
  label?: any[][],
  givens?: any[][][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater('TOTAL', [counts, density, limits, each, seed, label], givens, invocation);
}

/**
 * Picks whole rows of a table at random, such as past seasons, each with a chance in proportion to its weight; a row can come more than once. The table's heading row if it has one, then the picked rows with their texts and numbers as they stand.
 * @customfunction PICK
 * @param table The rows to pick from, with or without a heading row. A blank counts as 0.
 * @param weights One number of 0 or more for each row, in any unit: only proportions count. A row of weight 0 is never picked.
 * @param rows How many picks, 1 to 1048575, or two cells: first row and last row.
 * @param seed Any text or number except blank and 0. The same seed gives the same picks.
 * @param label Name of the picks. Each label has its own random numbers.
 */
export function pick(
  table: any[][],
  weights: any[][],
  rows: any[][],
  seed: any[][],
  label: any[][],
): any[][] {
  return answer('PICK', [table, weights, rows, seed, label], null);
}

/**
 * Keeps each row of a table with the chance weight divided by bound, which turns draws of one view into draws of another. A heading row, then the rows that survive, the number of the row in the table before them. With a bound given, new rows at the end never change which earlier rows survive; without one the survivors depend on the largest weight.
 * @customfunction THIN
 * @param table The rows to thin, with or without a heading row. A blank counts as 0.
 * @param weights One number of 0 or more for each row, in any unit. A row of weight 0 never survives, a row whose weight is the bound always does.
 * @param seed Any text or number except blank and 0. The same seed keeps the same rows.
 * @param label Name of the thinning. Each label has its own random numbers, apart from those of draws.
 * @param bound A number that no weight exceeds, in the unit of the weights. Left out: the largest weight.
 */
export function thin(
  table: any[][],
  weights: any[][],
  seed: any[][],
  label: any[][],
  bound?: any[][],
): any[][] {
  return answer('THIN', [table, weights, seed, label, bound], null);
}

/**
 * Turns columns of draws into figures with intervals: mean, standard deviation, percentiles by the rule of PERCENTILE.INC, and the mean of the lowest and of the highest share. A heading row, then one row a figure; for each column its value and the two ends of its interval, in its unit. Percentile intervals hold whatever the shape. Assumes independent rows: for STRATIFIED columns the intervals are too wide.
 * @customfunction SUMMARY
 * @param values One or more columns of numbers, with or without a heading row. A blank counts as 0; zeros at the end are counted.
 * @param shares Fractions between 0 and 1: each gives a percentile; up to 0.5 also the mean of the lowest rows, from 0.5 on that of the highest. Left out: 0.05, 0.1, 0.25, 0.5, 0.75, 0.9, 0.95.
 * @param confidence Fraction between 0 and 1. Left out: 0.95.
 * @param weights One number of 0 or more for each row, in any unit: how much of the whole it stands for. Rows' worth tells how many rows of equal weight they amount to. Left out: all alike.
 */
export function summary(
  values: any[][],
  shares?: any[][],
  confidence?: any[][],
  weights?: any[][],
): any[][] {
  return answer('SUMMARY', [values, shares, confidence, weights], null);
}

/**
 * Gives the chance that a value lies above, exactly at and below a threshold, or the chance of TRUE, each with its interval, as fractions of 1. Two columns: item and value. Where fewer than 30 rows count, or all but fewer than 30, the interval is the exact one (Clopper and Pearson), else Wilson's. Assumes independent rows: for STRATIFIED columns the intervals are too wide.
 * @customfunction EXCEEDANCE
 * @param values One or more columns of numbers, or of TRUE and FALSE such as A2:A2001>60, with or without a heading row. A blank counts as 0 or FALSE.
 * @param threshold A number in the unit of the values. Left out for TRUE and FALSE.
 * @param confidence Fraction between 0 and 1. Left out: 0.95.
 * @param weights One number of 0 or more for each row, in any unit: how much of the whole it stands for. Left out: all alike.
 */
export function exceedance(
  values: any[][],
  threshold?: any[][],
  confidence?: any[][],
  weights?: any[][],
): any[][] {
  return answer('EXCEEDANCE', [values, threshold, confidence, weights], null);
}

/**
 * Tells how many rows a wanted precision takes, judged by the rows of a first column, with the interval that this column's own noise leaves. Two columns: item and value. Assumes independent rows: a STRATIFIED column needs fewer.
 * @customfunction ROWSNEEDED
 * @param values A first column of a few hundred or thousand rows, with or without a heading.
 * @param share The percentile that is wanted, as fraction between 0 and 1. Left out: the mean.
 * @param halfwidth How far the ends of the interval may be from the value, in the unit of the values.
 * @param confidence Fraction between 0 and 1. Left out: 0.95.
 */
export function rowsNeeded(
  values: any[][],
  share?: any[][],
  halfwidth?: any[][],
  confidence?: any[][],
): any[][] {
  return answer('ROWSNEEDED', [values, share, halfwidth, confidence], null);
}

/**
 * Compares two columns row by row, such as the margin before and after another press: mean change with its interval, share of rows that rise and that fall, and how many rows it would have taken without pairing. Two columns: item and value, in the unit of the values. Assumes rows that are independent of one another: for STRATIFIED columns the intervals are too wide.
 * @customfunction PAIREDCHANGE
 * @param before A column of numbers, with or without a heading.
 * @param after A column of as many numbers, each belonging to the same scenario as the one beside it.
 * @param confidence Fraction between 0 and 1. Left out: 0.95.
 */
export function pairedChange(before: any[][], after: any[][], confidence?: any[][]): any[][] {
  return answer('PAIREDCHANGE', [before, after, confidence], null);
}

/**
 * Tells which input columns move an output that was worked out from them row by row: for each input the rank correlation and the first-order share of the output's variance (what would go, on average, if that input were known), each with its 95 % interval, the largest share first; then what the shares make together. What is left is what inputs do jointly, or what is not among them; where inputs are linked, their shares overlap. Assumes independent rows, 1,000 or more for shares worth reading; for STRATIFIED columns the intervals are too wide. The shares rest on the stated shapes and the model in the workbook; they do not replace judgement about what is not in them.
 * @customfunction DRIVERS
 * @param inputs One column for each input, with or without a heading row.
 * @param output One column of as many rows, in the same order.
 */
export function drivers(inputs: any[][], output: any[][]): any[][] {
  return answer('DRIVERS', [inputs, output], null);
}

/**
 * Checks whether columns of values look like independent draws of a shape: one overall line in plain words, then exact percentiles, mean and standard deviation beside the drawn ones with the range that is allowed, then tests of the whole (largest distance of shares, tails, cells of equal share, order of rows, repeats, rows outside the limits) with their p-values. Of 100 columns that follow their shape at most one shows any sign against it; no sign proves nothing. It says whether the values follow the shape, not whether the shape is right. Assumes independent rows that are not rounded: it does not apply to STRATIFIED columns.
 * @customfunction CHECK
 * @param values One or more columns of numbers, with or without a heading row: all against one shape, or as many as there are shapes.
 * @param density The shape that the values should follow: a formula, a table of points, a shape block or a shape list, as for DRAW.
 * @param limits Two cells, from and to, or a row name, from, to; as for DRAW.
 * @param givens What the names in the formula stand for, one range each: two columns name and value; a table with headings whose columns are functions such as base(x); or a column of numbers below its name.
 */
export function check(
  values: any[][],
  density: any[][],
  limits?: any[][],
  givens?: any[][][],
): any[][] {
  return answer('CHECK', [values, density, limits], givens);
}

/**
 * Compares cases that were worked out for the same scenarios: for each the mean and its place among the means, the chance to be the best of its row, and the average regret, which is how far it is from the best of the same row. A heading row, then one row a case. The figures rest on the stated shapes; they do not replace judgement about what is not in them. Assumes independent rows: for STRATIFIED columns the intervals are too wide.
 * @customfunction BESTOF
 * @param table One column a case and one row a scenario, with or without a heading row of case names.
 * @param largest TRUE if the largest value is the best, such as a margin; FALSE if the smallest is, such as a cost.
 * @param confidence Fraction between 0 and 1. Left out: 0.95.
 */
export function bestOf(table: any[][], largest: any[][], confidence?: any[][]): any[][] {
  return answer('BESTOF', [table, largest, confidence], null);
}

/**
 * Makes shares that belong together, such as those of harvest and price: give each column to QUANTILE as share, and the inputs are linked where they are born, each still exactly distributed. Bare shares between 0 and 1, one column for each row of the matrix; a row depends on its own number alone. The link is that of normal scores: extremes of two columns coincide no more than those of normal ones.
 * @customfunction LINKEDSHARES
 * @param rankcorrelations A square of rank correlations (Spearman's) from -1 to 1, the same on both sides of the diagonal, 1 on it; names in a first row and column are passed over. Impossible ones are refused, with the nearest that are possible.
 * @param rows How many rows, 1 to 1048575, or two cells: first row and last row.
 * @param seed Any text or number except blank and 0. The same seed gives the same shares.
 * @param label Name of the link. Each label has its own random numbers, apart from those of draws.
 */
export function linkedShares(
  rankcorrelations: any[][],
  rows: any[][],
  seed: any[][],
  label: any[][],
): any[][] {
  return answer('LINKEDSHARES', [rankcorrelations, rows, seed, label], null);
}

/**
 * Puts columns in another order so that their rank correlations come near wished ones (Iman and Conover 1982). The first column stays, each other one keeps its values; where a rank correlation would miss by more than 0.05 the answer is an error that says what can be reached. The rows as a whole decide, so that one more row changes the order. Bare values in the unit of each column.
 * @customfunction ALIGNRANKS
 * @param columns Columns of numbers with or without a heading row, at least 2 rows. A blank counts as 0.
 * @param rankcorrelations A square of rank correlations (Spearman's) from -1 to 1, one row and one column for each column, 1 on the diagonal; names in a first row and column are passed over.
 * @param seed Any text or number except blank and 0. The same seed gives the same order.
 * @param label Name of the alignment. Each label has its own random numbers, apart from those of draws.
 */
export function alignRanks(
  columns: any[][],
  rankcorrelations: any[][],
  seed: any[][],
  label: any[][],
): any[][] {
  return answer('ALIGNRANKS', [columns, rankcorrelations, seed, label], null);
}

/**
 * Tells how columns move together: the rank correlation (Spearman's) of every two of them, from -1 to 1, with intervals for independent rows, and which columns move exactly together, as those do that were drawn under the same label. A heading row, then one row for each column.
 * @customfunction RANKS
 * @param columns Columns of numbers with or without a heading row, at least 2 rows. A blank counts as 0.
 * @param confidence Confidence of the intervals as a fraction. Left out: 0.95.
 */
export function ranks(columns: any[][], confidence?: any[][]): any[][] {
  return answer('RANKS', [columns, confidence], null);
}
