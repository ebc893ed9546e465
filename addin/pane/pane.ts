/**
 * The start page in the task pane: says whether a workbook is there, lists the
 * functions, copies the example. It reads and writes no cells.
 */
import metadata from '../functions/functions.json';
import { exampleAsText, exampleCells } from './example';
import './pane.css';

/** How long a host may take to answer before the page says that there is none. */
const PATIENCE_MS = 5000;
/** The first sentence of a function's help; the rest is told beside its arguments. */
const FIRST_SENTENCE = /^.*?\.(?= |$)/;

function element(id: string): HTMLElement {
  const found = document.getElementById(id);
  if (found === null) throw new Error(`bug: the page has no #${id}`);
  return found;
}

function listFunctions(): void {
  const list = element('functions');
  for (const { name, description } of metadata.functions) {
    const term = document.createElement('dt');
    term.textContent = `UNDERCURVE.${name}`;
    const meaning = document.createElement('dd');
    meaning.textContent = FIRST_SENTENCE.exec(description)?.[0] ?? description;
    list.append(term, meaning);
  }
}

function showExample(): void {
  const body = element('example').querySelector('tbody');
  for (const row of exampleCells) {
    const line = document.createElement('tr');
    for (const value of row) {
      const cell = document.createElement('td');
      cell.textContent = String(value);
      if (row.length === 1) cell.colSpan = 2;
      line.append(cell);
    }
    body?.append(line);
  }
}

async function copyExample(): Promise<void> {
  const message = element('copied');
  try {
    await navigator.clipboard.writeText(exampleAsText());
    message.textContent = 'Copied. Select cell A1 of an empty sheet and paste.';
  } catch {
    // Some hosts keep the clipboard from the pane; a selected table can still be copied by hand.
    getSelection()?.selectAllChildren(element('example').querySelector('tbody') ?? document.body);
    message.textContent =
      'This host does not let the page copy. The example is selected: press Ctrl+C (Mac: Cmd+C).';
  }
}

function sayWhere(inExcel: boolean): void {
  element('outside').hidden = inExcel;
  element('host').textContent = inExcel
    ? 'The functions are ready: type =UNDERCURVE. in a cell.'
    : 'This page is open outside of a workbook, so no functions can be entered here.';
}

listFunctions();
showExample();
element('copy').addEventListener('click', () => void copyExample());

if (typeof Office === 'undefined') {
  // The host's script did not load, so there is neither a host nor a network.
  sayWhere(false);
} else {
  const giveUp = setTimeout(() => sayWhere(false), PATIENCE_MS);
  void Office.onReady(({ host }) => {
    clearTimeout(giveUp);
    sayWhere(host === Office.HostType.Excel);
  });
}
