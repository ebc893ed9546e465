/**
 * The edited workbook kept in this browser between visits, and as a file.
 * Storage that is full, forbidden or unreadable counts as nothing kept.
 */
import type { Model } from '@odoo/o-spreadsheet';
import { onEdit } from './edits';

/** Raise the number when the sample changes in a way that old edits would hide. */
const KEY = 'undercurve.workbook.2';
/** Milliseconds without an edit before it is kept: writing a large workbook down stops the page for a moment. */
const PAUSE = 2000;

/**
 * Keeps the model's workbook after each edit from now on; what is never edited is not kept.
 * Returns what ends that, for a workbook that gives way to another.
 */
export function keepEdits(model: Model): () => void {
  let timer: ReturnType<typeof setTimeout> | undefined;
  const keep = (): void => {
    if (timer === undefined) return;
    clearTimeout(timer);
    timer = undefined;
    store(JSON.stringify(writtenDown(model)));
  };
  onEdit(model, keepEdits, () => {
    clearTimeout(timer);
    timer = setTimeout(keep, PAUSE);
  });
  addEventListener('pagehide', keep);
  return () => {
    clearTimeout(timer);
    timer = undefined;
    removeEventListener('pagehide', keep);
    model.off('command-dispatched', keepEdits);
  };
}

/**
 * The workbook as data. The library's own way (19.3.7) writes it down twice, shortens one of the two
 * and reads that back to see whether nothing was lost, which takes four times as long.
 */
export function writtenDown(model: Model): object {
  return (model as unknown as Writer)._exportData(false);
}

interface Writer {
  _exportData(shortened: boolean): object;
}

function store(text: string): void {
  try {
    localStorage.setItem(KEY, text);
  } catch {
    // The workbook works on without being kept.
  }
}

export function forget(): void {
  try {
    localStorage.removeItem(KEY);
  } catch {
    // Nothing could be kept, so nothing needs forgetting.
  }
}

export function kept(): object | undefined {
  try {
    return parsed(localStorage.getItem(KEY) ?? '');
  } catch {
    return undefined;
  }
}

/** A saved workbook from its text; undefined when the text is not one. */
export function parsed(text: string): object | undefined {
  try {
    const data: unknown = JSON.parse(text);
    if (typeof data !== 'object' || data === null || !('sheets' in data)) return undefined;
    return Array.isArray(data.sheets) && data.sheets.length > 0 ? data : undefined;
  } catch {
    return undefined;
  }
}

/** Offers the workbook as a file to save. */
export function saveFile(name: string, data: object): void {
  const url = URL.createObjectURL(new Blob([JSON.stringify(data)], { type: 'application/json' }));
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  link.click();
  URL.revokeObjectURL(url);
}
