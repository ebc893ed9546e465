/** Tells when a workbook's content changes: edits, undo and redo, but not mere selection. */
import { isCoreCommand, type Model } from '@odoo/o-spreadsheet';

type Command = Parameters<typeof isCoreCommand>[0];

/** Calls back while each edit is under way; formulas that depend on it are not evaluated yet. */
export function onEdit(model: Model, owner: unknown, callback: () => void): void {
  model.on('command-dispatched', owner, (event: object) => {
    const command = event as Command;
    if (isCoreCommand(command) || command.type === 'UNDO' || command.type === 'REDO') callback();
  });
}
