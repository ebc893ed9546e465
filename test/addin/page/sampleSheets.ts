/** Parts of the sample workbook, which open sooner than the whole. */
import { sampleWorkbook } from '../../../addin/page/sample/workbook';

/** Sheets of the sample alone, in its order. */
export function sampleSheets(...names: readonly string[]): object {
  const sample = sampleWorkbook() as { readonly sheets: readonly { readonly name: string }[] };
  return { ...sample, sheets: sample.sheets.filter(({ name }) => names.includes(name)) };
}
