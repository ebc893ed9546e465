/**
 * The chart library, loaded with the kinds of chart the workbook uses and handed to
 * the grid library, which expects it as a global.
 */
import { registries } from '@odoo/o-spreadsheet';
import {
  BarController,
  BarElement,
  CategoryScale,
  Chart,
  Legend,
  LinearScale,
  LineController,
  LineElement,
  type Plugin,
  PointElement,
  type Scale,
  Title,
  Tooltip,
} from 'chart.js';

/** Dashes and widths by the name of a line, so that lines that lie on each other stay apart without colour. */
const STROKES: Readonly<Record<string, { borderDash: number[]; borderWidth: number }>> = {
  density: { borderDash: [], borderWidth: 2 },
  upper: { borderDash: [8, 6], borderWidth: 3.5 },
  lower: { borderDash: [2, 6], borderWidth: 3.5 },
};

const strokes: Plugin = {
  id: 'undercurveStrokes',
  beforeUpdate(chart) {
    for (const dataset of chart.data.datasets) {
      Object.assign(dataset, STROKES[dataset.label ?? '']);
    }
    // Heights are read from 0 on; where points lie is not.
    if (isScatter(chart)) Object.assign(chart.options.scales?.['y'] ?? {}, { beginAtZero: false });
  },
  // The legend is rebuilt by then; its lines get the dashes too.
  afterUpdate(chart) {
    for (const item of chart.legend?.legendItems ?? []) {
      const stroke = STROKES[item.text];
      if (stroke) Object.assign(item, { lineDash: stroke.borderDash.map((n) => n / 2) });
    }
  },
};

/** The grid library's additions for kinds of chart that the workbook does not have. */
const UNUSED = [
  'waterfallLinesPlugin',
  'funnelController',
  'funnelElement',
  'funnelTooltipPositioner',
  'sunburstLabelsPlugin',
  'sunburstHoverPlugin',
  'chartColorScalePlugin',
  'calendarController',
  'zoomWindowPlugin',
];

/** Once per page, before the first model. */
export function loadCharts(): void {
  Chart.register(
    BarController,
    BarElement,
    CategoryScale,
    Legend,
    LinearScale,
    LineController,
    LineElement,
    PointElement,
    Title,
    Tooltip,
    strokes,
  );
  const { _index_: x } = Chart.overrides.line.scales as Record<string, object>;
  Object.assign(x ?? {}, { afterBuildTicks: endWithData });
  Chart.defaults.font.family = 'system-ui, sans-serif';
  for (const name of UNUSED) registries.chartJsExtensionRegistry.remove(name);
  Object.assign(globalThis, { Chart });
}

function isScatter({ data }: Chart): boolean {
  return data.datasets.every((dataset) => 'showLine' in dataset && dataset.showLine === false);
}

/** Lets the x-axis of a line end where its data end, still numbered at round values. */
function endWithData(scale: Scale): void {
  if (!(scale instanceof LinearScale) || isScatter(scale.chart)) return;
  const { min, max } = scale.getMinMax(false);
  scale.ticks = scale.ticks.filter(({ value }) => min <= value && value <= max);
  scale.min = min;
  scale.max = max;
}
