/** The cells of the sample workbook: its first shapes, and those that call our functions by what they depend on. */
import type { Range } from '../../../src/index';
import type { Grid } from './grid';
import { rectangle } from './grid';

export const apples = (grid: Grid): Range => rectangle(grid, 'Shapes', ['A', 'B'], 8, 21);
export const downtime = (grid: Grid): Range => rectangle(grid, 'Shapes', ['D', 'E'], 8, 15);

const cells = (sheet: string, ...addresses: string[]) =>
  addresses.map((each) => `${sheet}!${each}`);
export const APPLE_DRAWS = ['Acceptance!A20', 'Draws!B8'];
export const APPLES = [
  ...APPLE_DRAWS,
  ...cells('Acceptance', 'G19', 'Y19'),
  ...cells('Answers', 'B24', 'B25', 'B27', 'B30'),
];
export const DOWNTIME = [
  'Draws!C8',
  ...cells('Acceptance', 'AH19', 'D20', 'P19'),
  ...cells('Answers', 'A42', 'C24', 'C25', 'C27', 'C30'),
];
export const COLD_DRAWS = ['Answers!J21'];
export const COLD = [...COLD_DRAWS, ...cells('Answers', 'D24', 'D25', 'D27', 'D30')];
export const WAITING_DRAWS = ['Answers!K21'];
export const WAITING = [...WAITING_DRAWS, ...cells('Answers', 'B36', 'E24', 'E25', 'E27', 'E30')];
export const PRICE = cells('Judgement', 'A27', 'P20', 'U19');
export const DELIVERIES = cells('Judgement', 'D28', 'Q20', 'AA19');
export const SUGAR = cells('Judgement', 'H19', 'R20', 'AG19');
export const SEASON = cells('Judgement', 'K37', 'S20', 'AM19');
export const JUDGED_DRAWS = cells('Judgement', 'P20', 'Q20', 'R20', 'S20');
export const INPUTS = ['Inputs!L9'];
export const PLANS = cells('Plans', 'A28', 'D28', 'K6', 'N28');
export const MARGINS = cells('Decision', 'A21', 'F21');
export const OVERFLOWS = ['Decision!A36'];
const HARVEST_CHECK = ['Decision!F33'];
export const LINKED_PRICE = ['Season!M9', ...MARGINS];
export const COLD_DAYS = ['Season!N9', ...MARGINS];
export const PRESSES = ['Season!O8', ...MARGINS, ...OVERFLOWS];
export const EVENT_SIZE = ['Season!S8', ...MARGINS, ...OVERFLOWS];
export const EVENTS = ['Season!R9', ...EVENT_SIZE];
export const LINKS = [
  ...cells('Season', 'J9', 'L9', 'M9', 'N9'),
  ...[MARGINS, OVERFLOWS, HARVEST_CHECK].flat(),
];
export const SCENARIOS = [...new Set([...LINKS, ...PRESSES, ...EVENTS])];
export const ALL = [
  ...[APPLES, DOWNTIME, COLD, WAITING, PRICE, DELIVERIES, SUGAR, SEASON, INPUTS, PLANS].flat(),
  ...SCENARIOS,
];
