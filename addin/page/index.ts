/**
 * Starts the local workbook: what was edited last time in this browser, or the sample.
 */
import { Model } from '@odoo/o-spreadsheet';
import gridTemplates from '@odoo/o-spreadsheet/dist/o_spreadsheet.xml';
import '@odoo/o-spreadsheet/dist/o_spreadsheet.css';
import { App } from '@odoo/owl';
import { Background } from '../functions/background';
import { loadCharts } from './charts';
import { hookFor, type WorkbookHook } from './hook';
import { prepareLibrary } from './library';
import { LongCalls } from './long';
import { leaveKeysToBrowser, trimMenus } from './menus';
import { moveBetweenRegions } from './regions';
import { makeRoom } from './room';
import { sampleWorkbook } from './sample/workbook';
import type { CallPlace } from './register';
import { forget, keepEdits, kept, parsed, saveFile, writtenDown } from './saved';
import './style/layout.css';
import './style/page.css';
import './style/workbook.css';
import { WorkbookView } from './view/workbook';
import ownTemplates from './view/workbook.xml';

declare global {
  interface Window {
    undercurveWorkbook: WorkbookHook;
  }
}

const long =
  typeof Worker === 'undefined'
    ? null
    : new LongCalls(new Background(() => new Worker('worker.js')), recalculate);
const log = prepareLibrary(long);
loadCharts();
trimMenus();
leaveKeysToBrowser();
moveBetweenRegions();

const place = element('workbook');
let app: App | undefined;
let model: Model | undefined;
let stopKeeping = (): void => undefined;

/** Puts a workbook in the place of the one shown; throws what the library throws at data it cannot read. */
async function show(data: object): Promise<void> {
  log.clear();
  long?.clear();
  const next = new Model(data);
  stopKeeping();
  app?.destroy();
  model = next;
  // The view adds the rest of its environment itself; at any width it shows the same parts.
  const env = { isSmall: false } as unknown as WorkbookView['env'];
  app = new App(WorkbookView, { props: { model, calls: log }, env });
  app.addTemplates(gridTemplates);
  app.addTemplates(ownTemplates);
  window.undercurveWorkbook = hookFor(model, log);
  await app.mount(place);
  stopKeeping = keepEdits(model);
}

/** Calculates these cells again, and what depends on them. */
function recalculate(places: readonly CallPlace[]): void {
  if (!model) return;
  for (const place of places) makeRoom(model, place);
  const { getters } = model;
  const cells = places.flatMap((place) => getters.getCell(place)?.id ?? []);
  if (cells.length > 0) model.dispatch('EVALUATE_CELLS', { cellIds: cells });
}

async function showKeptOrSample(): Promise<void> {
  const data = kept();
  if (data !== undefined) {
    try {
      return await show(data);
    } catch {
      forget();
    }
  }
  await show(sampleWorkbook());
}

function element(id: string): HTMLElement {
  const found = document.getElementById(id);
  if (found === null) throw new Error(`bug: the page has no #${id}`);
  return found;
}

const dialog = element('start-over-dialog') as HTMLDialogElement;
element('start-over').addEventListener('click', () => dialog.showModal());
dialog.addEventListener('close', () => {
  if (dialog.returnValue !== 'start-over') return;
  forget();
  void show(sampleWorkbook());
});

element('save-copy').addEventListener('click', () => {
  if (model) saveFile('undercurve-workbook.json', writtenDown(model));
});

const file = element('copy-file') as HTMLInputElement;
element('open-copy').addEventListener('click', () => file.click());
file.addEventListener('change', () => {
  const chosen = file.files?.[0];
  file.value = '';
  if (chosen) void openCopy(chosen);
});

async function openCopy(chosen: File): Promise<void> {
  const data = parsed(await chosen.text());
  try {
    if (data === undefined) throw new Error('not a workbook');
    await show(data);
  } catch {
    element('notice').textContent =
      `File: "${chosen.name}" is not a workbook saved here; choose one made with "Save a copy".`;
  }
}

void showKeptOrSample();
