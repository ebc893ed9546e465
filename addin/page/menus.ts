/**
 * The grid library's context menus, cut down to what works in this page, and the
 * key presses that the page leaves to the browser.
 */
import { registries } from '@odoo/o-spreadsheet';

const CELL_MENU = ['cut', 'copy', 'paste', 'paste_special', 'add_row_before', 'delete_row'];
const ROW_MENU = [
  'cut',
  'copy',
  'paste',
  'paste_special',
  'add_row_before',
  'add_row_after',
  'delete_row',
  'clear_row',
];
const COLUMN_MENU = [
  'cut',
  'copy',
  'paste',
  'paste_special',
  'add_column_before',
  'add_column_after',
  'delete_column',
  'clear_column',
];
const FIGURE_MENU = ['copy_as_image', 'download', 'delete'];

/** Panels, pictures, links and tables are not in this page; find and print are the browser's. */
const LEFT_TO_BROWSER = new Set(['f', 'h', 'k', 'o', 'p']);

export function trimMenus(): void {
  keepOnly(registries.cellMenuRegistry, CELL_MENU);
  keepOnly(registries.rowMenuRegistry, ROW_MENU);
  keepOnly(registries.colMenuRegistry, COLUMN_MENU);
  const chart = registries.figureRegistry.get('chart');
  registries.figureRegistry.replace('chart', {
    ...chart,
    menuBuilder: (...args) =>
      chart.menuBuilder(...args).filter((item) => FIGURE_MENU.includes(item.id)),
  });
}

/** Keeps the grid library from taking these keys; must run before the workbook is shown. */
export function leaveKeysToBrowser(): void {
  window.addEventListener(
    'keydown',
    (event) => {
      const isOurs =
        (event.ctrlKey || event.metaKey) && LEFT_TO_BROWSER.has(event.key.toLowerCase());
      if (isOurs || (event.altKey && event.key.toLowerCase() === 't')) {
        event.stopImmediatePropagation();
      }
    },
    { capture: true },
  );
}

function keepOnly(
  registry: { getKeys(): string[]; remove(key: string): void },
  keys: readonly string[],
): void {
  for (const key of registry.getKeys()) if (!keys.includes(key)) registry.remove(key);
}
