/**
 * The grid library's own messages in the form of ours: where, what was found, what
 * would be right. Sentences not listed here stay as the library has them.
 */
import { setTranslationMethod } from '@odoo/o-spreadsheet';

const WORDING: Readonly<Record<string, string>> = {
  "Result couldn't be automatically expanded.":
    'Result: it does not fit below or beside this cell; ask for fewer rows, or add rows to the sheet.',
  'Array result was not expanded because it would overwrite data.':
    'Result: a cell in its way is not empty; clear the cells below and beside.',
  'An unexpected error occurred. Submit a support ticket at odoo.com/help.':
    'Function: it failed for a reason of its own; please report the formula and this text:',
  'Unknown function: "%s"': 'Formula: "%s" is not a function here; check the spelling.',
  'Invalid number of arguments for the %(functionName)s function. Expected %(minArgRequired)s minimum, but got %(nbrArgSupplied)s instead.':
    'Formula: %(functionName)s has too few arguments, %(nbrArgSupplied)s; give at least %(minArgRequired)s.',
  'Invalid number of arguments for the %(functionName)s function. Expected %(maxArgPossible)s maximum, but got %(nbrArgSupplied)s instead.':
    'Formula: %(functionName)s has too many arguments, %(nbrArgSupplied)s; give at most %(maxArgPossible)s.',
  'The divisor must be different from zero.':
    'Formula: it divides by 0; give a divisor other than 0.',
  'Invalid expression': 'Formula: it cannot be read; check brackets, quotes and separators.',
  'Invalid formula': 'Formula: it cannot be read; check brackets, quotes and separators.',
  'Wrong function call':
    'Formula: a function call is not complete; check its brackets and separators.',
  'Invalid reference': 'Formula: a cell it refers to does not exist; refer to one that does.',
  'Circular reference':
    'Formula: it refers to its own cell, directly or in a circle; break the circle.',
};

/** Once per program, before the first model. */
export function sayInOurWords(): void {
  setTranslationMethod((...[text]) => WORDING[text] ?? text);
}
