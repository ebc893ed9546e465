/**
 * The workbook on the page: the grid library's grid and cell editor in a frame of
 * our own, with the sheets and a line of help above and the message area below.
 * The library's menus, toolbars and side panels are left out.
 */
import { Spreadsheet, stores } from '@odoo/o-spreadsheet';
import { onMounted, onPatched, onWillUnmount, useRef, useState, useSubEnv } from '@odoo/owl';
import type { CallLog } from '../calls';
import { onEdit } from '../edits';
import {
  findPosition,
  type Message,
  messageOf,
  type Position,
  problemsIn,
  samePlace,
  sheetAddressOf,
} from '../message';
import { paintWithPalette } from './palette';

/** What each sheet of the sample is for; other sheets have no line. */
const HELP: Readonly<Record<string, string>> = {
  Shapes: 'State what is not known: points or a formula. Yellow cells are yours to change.',
  Draws: 'Each column follows its shape exactly and stays still until an input changes.',
  Acceptance: 'How each column was drawn, and the evidence for it.',
  Judgement: 'What people know, made into shapes that can be drawn.',
  Inputs: "A dozen inputs from one formula, and the season's margin.",
  Answers: 'Exact shares, values and means from the shapes, without draws.',
  Plans:
    'Several quantities at once: every plan that keeps to the conditions, drawn evenly or weighted.',
  Season: 'Inputs that belong together, a scenario a row: linked, chained, by case, summed.',
  Decision:
    'From draws to an answer: which case, how sure, what moves it, and a check of the draws.',
};

export class WorkbookView extends Spreadsheet {
  static override template = 'undercurve-workbook';
  static override props = { ...Spreadsheet.props, calls: Object };
  static override components = {
    ...Spreadsheet.components,
    TopBarComposer: Spreadsheet.components.TopBar.components.TopBarComposer,
  };

  declare props: Spreadsheet['props'] & { readonly calls: CallLog };

  private readonly content = useRef('content');
  private readonly gridFrame = useRef('gridFrame');
  private readonly notes = useState({ recalculated: '', complaint: '' });
  private editor: { readonly editionMode: string } | undefined;
  /**
   * Failing formulas; none kept after an edit, until they are asked for. In an object
   * because the template runs getters on a derived copy of this component.
   */
  private readonly cache: { problems?: readonly Position[] | undefined } = {};

  override setup(): void {
    super.setup();
    this.editor = stores.useStore(stores.CellComposerStore);
    const nothing = () => undefined;
    useSubEnv({ openSidePanel: nothing, replaceSidePanel: nothing, toggleSidePanel: nothing });
    stores.useStore(stores.NotificationStore).updateNotificationCallbacks({
      notifyUser: ({ text }) => this.complain(String(text)),
      raiseError: (text, done) => {
        this.complain(String(text));
        done?.();
      },
      askConfirmation: (text, confirm, cancel) =>
        window.confirm(String(text)) ? confirm() : cancel?.(),
    });
    onMounted(() => {
      this.model.on('update', this.notes, () => this.noteRecalculation());
      onEdit(this.model, this.notes, () => (this.cache.problems = undefined));
      this.noteRecalculation();
      const canvas = this.gridFrame.el?.querySelector('canvas');
      if (canvas) paintWithPalette(canvas);
      this.nameEditors();
      this.render(true);
    });
    onPatched(() => this.nameEditors());
    onWillUnmount(() => {
      this.model.off('update', this.notes);
      this.model.off('command-dispatched', this.notes);
    });
  }

  get sheets(): readonly {
    readonly id: string;
    readonly name: string;
    readonly current: boolean;
  }[] {
    const { getters } = this.model;
    const active = getters.getActiveSheetId();
    return getters
      .getVisibleSheetIds()
      .map((id) => ({ id, name: getters.getSheetName(id), current: id === active }));
  }

  get help(): string {
    return HELP[this.model.getters.getActiveSheetName()] ?? '';
  }

  get address(): string {
    const { getters } = this.model;
    return getters.zoneToXC(getters.getActiveSheetId(), getters.getSelectedZone());
  }

  get message(): Message {
    const complaint = this.notes.complaint;
    if (complaint !== '') return { where: '', text: complaint, problem: true };
    return messageOf(this.model, this.active);
  }

  /** The first failing formula that is not the selected cell, to go to. */
  get elsewhere(): { readonly label: string; readonly position: Position } | undefined {
    this.cache.problems ??= problemsIn(this.model);
    const others = this.cache.problems.filter((each) => !samePlace(each, this.active));
    const first = others[0];
    if (first === undefined || this.message.problem) return undefined;
    const { text } = messageOf(this.model, first);
    const more = others.length > 1 ? ` (and ${others.length - 1} more)` : '';
    return {
      label: `${sheetAddressOf(this.model.getters, first)} ${text}${more}`,
      position: first,
    };
  }

  get recalculated(): string {
    return this.notes.recalculated;
  }

  get canUndo(): boolean {
    return this.model.getters.canUndo();
  }

  undo(): void {
    this.model.dispatch('REQUEST_UNDO');
  }

  showSheet(sheetIdTo: string): void {
    const sheetIdFrom = this.model.getters.getActiveSheetId();
    if (sheetIdFrom !== sheetIdTo)
      this.model.dispatch('ACTIVATE_SHEET', { sheetIdFrom, sheetIdTo });
    this.focusGrid();
  }

  goTo({ sheetId, col, row }: Position): void {
    this.showSheet(sheetId);
    this.model.selection.selectCell(col, row);
  }

  onAddressKey(event: KeyboardEvent & { readonly currentTarget: HTMLInputElement }): void {
    const field = event.currentTarget;
    if (event.key === 'Escape') field.value = this.address;
    else if (event.key !== 'Enter') return;
    event.preventDefault();
    if (event.key === 'Enter') {
      const position = findPosition(this.model, field.value);
      if (position === undefined) {
        this.notes.complaint = `Address: "${field.value}" is not a cell here; give one such as B8 or Draws!B8.`;
        return;
      }
      this.goTo(position);
    }
    this.focusGrid();
  }

  /** Shown in the message area until the next selection or edit. */
  private complain(text: string): void {
    this.notes.complaint = text;
  }

  private get active(): Position {
    return this.model.getters.getActivePosition();
  }

  private noteRecalculation(): void {
    this.notes.complaint = '';
    const { calls, milliseconds } = this.props.calls.takeRecent();
    if (calls === 0) return;
    const formulas = calls === 1 ? '1 formula' : `${calls} formulas`;
    this.notes.recalculated = `${formulas} recalculated, ${Math.max(1, Math.round(milliseconds))} ms`;
  }

  /**
   * Typing over a cell: the library empties its editor only when it next draws, so a
   * second key before that would be followed by the old content. This empties it at once.
   */
  onBeforeInput(event: InputEvent): void {
    const isTyped = event.inputType === 'insertText' && !event.isComposing;
    if (isTyped && this.editor?.editionMode === 'inactive') {
      (event.target as HTMLElement).replaceChildren();
    }
  }

  /** The library's editors carry no names for assistive technology. */
  private nameEditors(): void {
    const name = (root: HTMLElement | null, label: string) => {
      const editor = root?.querySelector('.o-composer');
      editor?.setAttribute('role', 'textbox');
      editor?.setAttribute('aria-label', label);
    };
    name(this.content.el, 'Content of the selected cell');
    name(this.gridFrame.el, 'Grid: arrow keys move, typing edits, F6 leaves');
  }
}
