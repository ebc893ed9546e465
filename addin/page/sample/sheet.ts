/**
 * A sheet under construction: cells, looks, number formats, widths and charts by
 * address, put together as the data from which the grid library builds a model.
 * Not handled: merged cells, rules and filters, which the sample does not use.
 */
import type { Look } from './looks';

/** A chart to place on a sheet; `data` is the grid library's own definition. */
interface ChartPlan {
  readonly id: string;
  /** Column and row of its upper left corner, counted from 0. */
  readonly col: number;
  readonly row: number;
  /** Pixels to the right of that corner. */
  readonly shift: number;
  readonly width: number;
  readonly height: number;
  readonly data: Readonly<Record<string, unknown>>;
}

interface SheetSize {
  readonly columns: number;
  readonly rows: number;
  /** Rows that stay in view. */
  readonly frozenRows: number;
}

export class SheetPlan {
  private readonly cells: Record<string, string> = {};
  private readonly looks = new Map<string, Look>();
  private readonly formats = new Map<string, string>();
  private readonly charts: ChartPlan[] = [];
  private widths: readonly number[] = [];

  constructor(
    readonly name: string,
    private readonly size: SheetSize,
  ) {}

  /** Text, number or formula (as typed) in one cell. */
  put(address: string, content: string | number, look?: Look): this {
    this.cells[address] = String(content);
    if (look !== undefined) this.looks.set(address, look);
    return this;
  }

  /** Rows of contents from this column and row (counted from 1) on. */
  putRows(column: string, row: number, rows: readonly (readonly (string | number)[])[]): this {
    const first = column.charCodeAt(0);
    rows.forEach((cells, i) =>
      cells.forEach((content, j) => this.put(String.fromCharCode(first + j) + (row + i), content)),
    );
    return this;
  }

  look(zone: string, look: Look): this {
    this.looks.set(zone, look);
    return this;
  }

  format(zone: string, format: string): this {
    this.formats.set(zone, format);
    return this;
  }

  /** Column widths in pixels, from column A on. */
  columnWidths(widths: readonly number[]): this {
    this.widths = widths;
    return this;
  }

  chart(plan: ChartPlan): this {
    this.charts.push(plan);
    return this;
  }

  /** The sheet's data; looks and formats are numbered through the registers of the whole workbook. */
  build(styleNumber: (look: Look) => number, formatNumber: (format: string) => number): object {
    return {
      id: this.name,
      name: this.name,
      colNumber: this.size.columns,
      rowNumber: this.size.rows,
      cells: this.cells,
      styles: Object.fromEntries([...this.looks].map(([zone, look]) => [zone, styleNumber(look)])),
      formats: Object.fromEntries(
        [...this.formats].map(([zone, format]) => [zone, formatNumber(format)]),
      ),
      borders: {},
      cols: Object.fromEntries(this.widths.map((size, i) => [i, { size }])),
      rows: {},
      merges: [],
      conditionalFormats: [],
      dataValidationRules: [],
      tables: [],
      panes: { xSplit: 0, ySplit: this.size.frozenRows },
      areGridLinesVisible: true,
      isVisible: true,
      figures: this.charts.map(({ id, col, row, shift, width, height, data }) => ({
        id,
        tag: 'chart',
        col,
        row,
        offset: { x: shift, y: 0 },
        width,
        height,
        data: { ...data, chartId: id },
      })),
    };
  }
}
