/**
 * Dates as serial numbers of days: steps at midnights, month ends and year ends.
 *
 * Source: OpenFormula 1.2 §6.10, ECMA-376 part 1 §18.17.4 (1900 date system: serial 61
 * is 1 March 1900). Years are counted from 1 March, so that the leap day comes last and
 * the months' lengths follow ⌊(153 m + 2)/5⌋ (common practice).
 * Not handled: dates before 1 March 1900, on which spreadsheet programs disagree (one
 * line of them has a 29 February 1900), and dates after 31 December 9999.
 */
import type { Interval } from '../../numeric/interval';
import * as I from '../../numeric/interval';
import * as J from '../../numeric/jet';
import type { Operation } from '../operation';
import { Defined } from '../operation';
import type { Maker, Row } from '../row';
import { ADD, DIVIDE, MULTIPLY, SUBTRACT } from './arithmetic';
import { INT } from './rounding';

/** 1 March 1900 and 31 December 9999. */
const FIRST = 61;
const LAST = 2958465;
/** Days from 1 March of the year 0 to serial 0. */
const EPOCH = 693899;
const DAYS_IN_4_CENTURIES = 146097;

interface Day {
  readonly year: number;
  /** 1 to 12. */
  readonly month: number;
  /** 1 to 31. */
  readonly day: number;
}

function dayOf(serial: number): Day {
  const n = Math.floor(serial) + EPOCH;
  const era = Math.floor(n / DAYS_IN_4_CENTURIES);
  const inEra = n - era * DAYS_IN_4_CENTURIES;
  const yearOfEra = Math.floor(
    (inEra - Math.floor(inEra / 1460) + Math.floor(inEra / 36524) - Math.floor(inEra / 146096)) /
      365,
  );
  const inYear =
    inEra - (365 * yearOfEra + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100));
  const fromMarch = Math.floor((5 * inYear + 2) / 153);
  const month = fromMarch < 10 ? fromMarch + 3 : fromMarch - 9;
  return {
    year: yearOfEra + era * 400 + (month <= 2 ? 1 : 0),
    month,
    day: inYear - Math.floor((153 * fromMarch + 2) / 5) + 1,
  };
}

/** The serial number of the first day of the month that comes `months` after January of the year 0. */
function firstOfMonth(months: number): number {
  const shifted = months - 2;
  const year = Math.floor(shifted / 12);
  const fromMarch = shifted - 12 * year;
  const leapDays = Math.floor(year / 4) - Math.floor(year / 100) + Math.floor(year / 400);
  return 365 * year + leapDays + Math.floor((153 * fromMarch + 2) / 5) - EPOCH;
}

/** A month's place on the line of all months. */
function monthsOf({ year, month }: Day): number {
  return 12 * year + month - 1;
}

/** Kept within the calendar: the proof refuses the rest by `defined`. */
function inside(serial: number): number {
  return Math.min(LAST, Math.max(FIRST, serial));
}

/** A step function of the serial number; `settle` sets the enclosure from the first and last day. */
function datePart(
  name: string,
  part: (day: Day) => number,
  settle: (out: Interval, first: Day, last: Day) => void,
  /** The nearest jump at or below a serial number, and the next one above. */
  jumps: (serial: number) => readonly [number, number],
): Operation {
  return {
    name,
    point: (x) => (x >= FIRST && x < LAST + 1 ? part(dayOf(x)) : NaN),
    enclose: (out, u) => settle(out, dayOf(inside(u.lo)), dayOf(inside(u.hi))),
    slopes(out) {
      if (out.v.lo === out.v.hi) J.setConstantSlopes(out);
      else J.setJump(out);
    },
    defined(u) {
      if (u.lo >= FIRST && u.hi < LAST + 1) return Defined.Everywhere;
      return u.hi >= FIRST && u.lo < LAST + 1 ? Defined.InPart : Defined.Nowhere;
    },
    turnsOn: 0,
    level({ lo, hi }) {
      if (lo < FIRST) return FIRST;
      if (hi >= LAST + 1) return LAST + 1;
      const [below, above] = jumps(lo / 2 + hi / 2);
      return below > lo ? below : above;
    },
    outside: `${name} takes a date before 1 March 1900, on which spreadsheet programs disagree, or after 9999`,
  };
}

const YEAR = datePart(
  'YEAR',
  (day) => day.year,
  (out, first, last) => I.set(out, first.year, last.year),
  (serial) => {
    const { year } = dayOf(serial);
    return [firstOfMonth(12 * year), firstOfMonth(12 * (year + 1))];
  },
);

function monthJumps(serial: number): readonly [number, number] {
  const months = monthsOf(dayOf(serial));
  return [firstOfMonth(months), firstOfMonth(months + 1)];
}

const MONTH = datePart(
  'MONTH',
  (day) => day.month,
  (out, first, last) => {
    if (first.year === last.year) I.set(out, first.month, last.month);
    else I.set(out, 1, 12);
  },
  monthJumps,
);

function dayJumps(serial: number): readonly [number, number] {
  return [Math.floor(serial), Math.floor(serial) + 1];
}

const DAY = datePart(
  'DAY',
  (day) => day.day,
  (out, first, last) => {
    if (monthsOf(first) === monthsOf(last)) I.set(out, first.day, last.day);
    else I.set(out, 1, 31);
  },
  dayJumps,
);

/** Serial 1 counts as a Sunday. */
function weekday(serial: number, firstDay: number): number {
  const days = Math.floor(serial) - 1 - firstDay;
  return days - 7 * Math.floor(days / 7);
}

/** Days since the last `firstDay` (0 is Sunday), plus `base`. */
function weekdayOf(firstDay: number, base: 0 | 1): Operation {
  const part = (serial: number): number => weekday(serial, firstDay) + base;
  return {
    ...datePart(
      'WEEKDAY',
      () => NaN,
      () => undefined,
      dayJumps,
    ),
    name: `WEEKDAY from ${firstDay} counting from ${base}`,
    point: (x) => (x >= FIRST && x < LAST + 1 ? part(x) : NaN),
    enclose(out, u) {
      const [first, last] = [Math.floor(inside(u.lo)), Math.floor(inside(u.hi))];
      const spansWeek = last - first >= 7 || part(last) < part(first);
      I.set(out, spansWeek ? base : part(first), spansWeek ? base + 6 : part(last));
    },
  };
}

/** By the type of WEEKDAY: the day it counts from (0 is Sunday) and the number of that day. */
function weekdayType(type: number): readonly [number, 0 | 1] | undefined {
  if (type === 1) return [0, 1];
  if (type === 2) return [1, 1];
  if (type === 3) return [1, 0];
  return type >= 11 && type <= 17 && Math.floor(type) === type ? [(type - 10) % 7, 1] : undefined;
}

/** January 1900 and December 9999, counted from January of the year 0. */
const FIRST_MONTH = 12 * 1900;
const LAST_MONTH = 12 * 9999 + 11;

/** The first day of a month counted from January of the year 0. */
const FIRST_OF_MONTH: Operation = {
  name: 'first of month',
  point: (months) => (months >= FIRST_MONTH && months <= LAST_MONTH ? firstOfMonth(months) : NaN),
  enclose(out, u) {
    const lo = firstOfMonth(Math.floor(Math.max(FIRST_MONTH, u.lo)));
    I.set(out, lo, firstOfMonth(Math.floor(Math.min(LAST_MONTH, u.hi))));
  },
  slopes(out) {
    if (out.v.lo === out.v.hi) J.setConstantSlopes(out);
    else J.setJump(out);
  },
  defined(u) {
    if (u.lo >= FIRST_MONTH && u.hi <= LAST_MONTH) return Defined.Everywhere;
    return u.hi >= FIRST_MONTH && u.lo <= LAST_MONTH ? Defined.InPart : Defined.Nowhere;
  },
  outside: 'DATE takes a year outside 1900 to 9999, on which spreadsheet programs disagree',
};

function date(make: Maker, [year, month, day]: readonly number[]): number {
  const years = make.apply(MULTIPLY, make.apply(INT, year!), make.number(12));
  const wholeMonth = make.apply(INT, month!);
  const months = make.apply(SUBTRACT, make.apply(ADD, years, wholeMonth), make.number(1));
  const known = make.enclosure(months);
  if (known && FIRST_OF_MONTH.defined!(known, known) !== Defined.Everywhere) {
    throw make.refuse(
      `DATE with month ${known.lo - 12 * Math.floor(known.lo / 12) + 1} of the year ${Math.floor(known.lo / 12)}`,
      'give a year from 1900 to 9999',
    );
  }
  const before = make.apply(SUBTRACT, make.apply(FIRST_OF_MONTH, months), make.number(1));
  return make.apply(ADD, before, make.apply(INT, day!));
}

/** Hours, minutes and seconds as a share of a day. */
function time(make: Maker, args: readonly number[]): number {
  const parts = args.map((arg) => make.exactValue(arg));
  const [hours, minutes, seconds] = parts;
  if (parts.some((part) => part === undefined || part < 0 || Math.floor(part) !== part)) {
    throw make.refuse(
      'TIME with a part that is not a whole number from 0, on which spreadsheet programs disagree',
      'give whole constants, or write hours as hours/24',
    );
  }
  const total = (hours! * 3600 + minutes! * 60 + seconds!) % 86400;
  return make.apply(DIVIDE, make.number(total), make.number(86400));
}

export const CALENDAR_ROWS: readonly Row[] = [
  { name: 'DATE', least: 3, most: 3, rewrite: date },
  { name: 'TIME', least: 3, most: 3, rewrite: time },
  { name: 'YEAR', least: 1, most: 1, operation: YEAR },
  { name: 'MONTH', least: 1, most: 1, operation: MONTH },
  { name: 'DAY', least: 1, most: 1, operation: DAY },
  {
    name: 'WEEKDAY',
    least: 1,
    most: 2,
    rewrite(make, [serial, type]) {
      const known = type === undefined ? 1 : make.exactValue(type);
      const settled = known === undefined ? undefined : weekdayType(known);
      if (!settled) {
        throw make.refuse(
          `WEEKDAY with the type ${known ?? 'that is not a constant'}`,
          'give 1, 2, 3 or 11 to 17',
        );
      }
      return make.apply(weekdayOf(...settled), serial!);
    },
  },
];
