/**
 * The kinds of chart in the sample workbook, as the grid library defines them.
 * Lines are told apart by dashes as well as colours (../charts.ts adds the dashes by name).
 */
import { BLUE, GREEN, RED } from './looks';
import { binRange, profileRange, type Quantity } from './quantities';

type Definition = Readonly<Record<string, unknown>>;
type Series = readonly [label: string, range: string, color: string];

/** Density, upper and lower bound of a quantity's profile. */
export function boundsChart({ title, unit, evidence }: Quantity): Definition {
  const [x, density, upper, lower] = evidence.profile;
  return {
    ...lines(`${title}: the bounds`, unit, 'density', profileRange(x), [
      ['density', profileRange(density), GREEN],
      ['upper', profileRange(upper), RED],
      ['lower', profileRange(lower), BLUE],
    ]),
    legendPosition: 'bottom',
  };
}

/** The density of a quantity's profile alone. */
export function densityChart({ title, unit, evidence }: Quantity): Definition {
  const [x, density] = evidence.profile;
  return lines(`${title}, as stated`, unit, 'density', profileRange(x), [
    ['density', profileRange(density), GREEN],
  ]);
}

/** A quantity's table of points, headings in its first row, as a line with its points. */
export function pointsChart({ title, unit }: Quantity, x: string, heights: string): Definition {
  return {
    ...lines(`${title}, as stated`, unit, 'height', x, [['height', heights, GREEN]]),
    hideDataMarkers: false,
  };
}

/** The counted draws of a quantity, labelled by where each bin starts. */
export function countsChart(quantity: Quantity): Definition {
  const { title, unit, evidence, color } = quantity;
  const [above, , count] = evidence.counts;
  return barsChart({
    title: `${title}: the draws`,
    x: `${unit}, bins from`,
    y: 'draws',
    labels: binRange(above, quantity),
    values: binRange(count, quantity),
    color,
  });
}

/** Titles, ranges and colour of a chart of counts; the ranges have no headings. */
interface Bars {
  readonly title: string;
  readonly x: string;
  readonly y: string;
  readonly labels: string;
  readonly values: string;
  readonly color: string;
}

export function barsChart({ title, x, y, labels, values, color }: Bars): Definition {
  return {
    type: 'bar',
    stacked: false,
    ...common(title, x, y),
    ...dataOf(labels, [[y, values, color]], false),
  };
}

/** A line over numbers; the first cell of each range is its heading. */
export function lineChart(
  title: string,
  unit: string,
  x: string,
  series: readonly Series[],
): Definition {
  return lines(title, unit, 'density', x, series);
}

/** Points by two ranges of numbers; the first cell of each is its heading. */
export function scatterChart(
  title: string,
  x: string,
  y: string,
  xRange: string,
  yRange: string,
  color: string,
): Definition {
  return {
    type: 'scatter',
    labelsAsText: false,
    ...common(title, x, y),
    ...dataOf(xRange, [[y, yRange, color]], true),
  };
}

function lines(
  title: string,
  x: string,
  y: string,
  xRange: string,
  series: readonly Series[],
): Definition {
  return {
    type: 'line',
    labelsAsText: false,
    stacked: false,
    cumulative: false,
    hideDataMarkers: true,
    ...common(title, x, y),
    ...dataOf(xRange, series, true),
  };
}

function common(title: string, x: string, y: string): Definition {
  return {
    title: { text: title, bold: true, fontSize: 14, color: GREEN },
    background: '#ffffff',
    legendPosition: 'none',
    axesDesign: {
      x: { title: { text: x, fontSize: 11 } },
      y: { title: { text: y, fontSize: 11 } },
    },
  };
}

function dataOf(labelRange: string, series: readonly Series[], headed: boolean): Definition {
  return {
    dataSource: {
      type: 'range',
      dataSets: series.map(([label, dataRange]) => ({ dataSetId: label, dataRange })),
      dataSetsHaveTitle: headed,
      labelRange,
    },
    dataSetStyles: Object.fromEntries(
      series.map(([label, , color]) => [label, { label, backgroundColor: color }]),
    ),
  };
}
