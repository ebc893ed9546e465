/**
 * The looks of cells and the colours of charts in the sample workbook.
 * Text and its ground keep a contrast of at least 4.5 : 1, lines on white 3 : 1.
 */

export const GREEN = '#1f4d3a';
export const RED = '#a63d2f';
export const BLUE = '#2d6a9f';
const INK = '#23291f';
const MUTED = '#5a5f55';
const LEAF = '#e4ece5';
const HONEY = '#fdf1d3';

/** title, note: words · head, unit: above columns · input: meant to be changed · word: names a line · result: computed · verdict: the gist of a table. */
export type Look =
  | 'title'
  | 'note'
  | 'caution'
  | 'section'
  | 'head'
  | 'unit'
  | 'input'
  | 'word'
  | 'result'
  | 'verdict';

const LOOKS: Readonly<Record<Look, object>> = {
  title: { bold: true, fontSize: 15, textColor: GREEN },
  note: { textColor: MUTED },
  caution: { textColor: RED },
  section: { bold: true, fontSize: 12, textColor: GREEN },
  head: { bold: true, fillColor: LEAF, textColor: GREEN, align: 'left' },
  unit: { italic: true, textColor: MUTED, align: 'left' },
  input: { fillColor: HONEY, textColor: INK, align: 'left' },
  word: { textColor: INK, align: 'left' },
  result: { textColor: INK, align: 'left', wrapping: 'clip' },
  verdict: { bold: true, textColor: INK, align: 'left' },
};

/** The grid library's style of a look. */
export function styleOf(look: Look): object {
  return LOOKS[look];
}
