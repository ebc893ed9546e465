/**
 * The two uncertain quantities of the sample, and where in the workbook each of
 * their parts stands. Every formula and chart takes its addresses from here.
 */
import { BLUE, RED } from './looks';

/** Rows of sheet "Acceptance": section titles, headings, first numbers, and the end of the profiles. */
export const EVIDENCE_ROWS = { section: 18, head: 19, first: 20, profileLast: 140 };
/** Points of a profile: enough for a smooth line at the size of the charts. */
export const PROFILE_POINTS = EVIDENCE_ROWS.profileLast - EVIDENCE_ROWS.head;

/** Inputs on sheet "Draws". */
export const SEED = 'Draws!$B$3';
export const ROWS = 'Draws!$B$4';

export interface Quantity {
  readonly title: string;
  readonly unit: string;
  /** The range of the shape on sheet "Shapes". */
  readonly shape: string;
  /** The cell of its label. */
  readonly label: string;
  /** Arguments of DRAW and ACCEPTANCE; a block alone says them all. */
  readonly drawing: string;
  /** The first cell of its draws on sheet "Draws". */
  readonly draws: string;
  readonly color: string;
  /** Columns on sheet "Acceptance". */
  readonly evidence: {
    /** Item, value. */
    readonly diagnostics: readonly [string, string];
    /** First and last of the pieces. */
    readonly pieces: readonly [string, string];
    /** x, density, upper, lower. */
    readonly profile: readonly [string, string, string, string];
    /** Above, up to, draws. */
    readonly counts: readonly [string, string, string];
  };
  /** The fixed bins of its histogram. */
  readonly bins: { readonly first: number; readonly width: number; readonly n: number };
}

export const APPLES: Quantity = {
  title: 'Apples a day',
  unit: 'tonnes a day',
  shape: 'Shapes!$A$8:$B$21',
  label: 'Draws!$B$6',
  drawing: `Shapes!$A$8:$B$21,,${ROWS},${SEED},Draws!$B$6`,
  draws: 'Draws!$B$8',
  color: RED,
  evidence: {
    diagnostics: ['A', 'B'],
    pieces: ['G', 'N'],
    profile: ['Y', 'Z', 'AA', 'AB'],
    counts: ['AD', 'AE', 'AF'],
  },
  bins: { first: 4, width: 2, n: 22 },
};

export const DOWNTIME: Quantity = {
  title: 'Press downtime',
  unit: 'hours a week',
  shape: 'Shapes!$D$8:$E$15',
  label: 'Shapes!$E$13',
  drawing: 'Shapes!$D$8:$E$15',
  draws: 'Draws!$C$8',
  color: BLUE,
  evidence: {
    diagnostics: ['D', 'E'],
    pieces: ['P', 'W'],
    profile: ['AH', 'AI', 'AJ', 'AK'],
    counts: ['AM', 'AN', 'AO'],
  },
  bins: { first: 0, width: 0.5, n: 24 },
};

/** A column of a profile with its heading, as a range. */
export function profileRange(column: string): string {
  return `Acceptance!${column}${EVIDENCE_ROWS.head}:${column}${EVIDENCE_ROWS.profileLast}`;
}

/** A column of the counts without the lines below and above the bins, as a range. */
export function binRange(column: string, { bins }: Quantity): string {
  const first = EVIDENCE_ROWS.first + 1;
  return `Acceptance!${column}${first}:${column}${first + bins.n - 1}`;
}
