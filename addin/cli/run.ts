/**
 * The commands: reads arguments, calls the catalogue, prints cells as JSON.
 * Status 0 is an answer, 1 an error in the input of a function, 2 wrong usage.
 */
import { parseArgs } from 'node:util';
import packageJson from '../../package.json';
import { CellErrorPassed, InputError } from '../../src/index';
import { catalogue, namespace } from '../functions/catalogue';
import type { CatalogueEntry } from '../functions/catalogue';
import { cellsToJson, rangesFromJson } from './cells';
import { UsageError } from './usage';

interface Streams {
  write(text: string): void;
  writeError(text: string): void;
  /** The text of a file; "-" is standard input. */
  read(file: string): string;
}

const HELP = `undercurve: exact draws from a density known up to a constant, with the proof beside them.

  undercurve call ${namespace}.NAME ARGUMENTS   calls a worksheet function, prints its cells
  undercurve functions [--json]            lists the functions and their arguments
  undercurve --help | --version

ARGUMENTS is a JSON array, one element an argument; - reads it from standard input,
@FILE from a file. An argument is a range, written as an array of rows, or a single
cell. null is a blank cell, or an argument left out; an error cell is {"error":"#N/A"}.
Repeating arguments follow one after the other. The answer is a range in the same form.

  undercurve call ${namespace}.DRAW '["EXP(-x)", [[0, 5]], 3, "plan-2027", "downtime"]'

Status: 0 an answer, 1 an error in what the function was given, 2 wrong usage.
The draws follow the stated shape; they do not make the shape right.
`;

/** Runs one command line; the number is the status to end with. */
export function run(argv: readonly string[], streams: Streams): number {
  try {
    streams.write(answer(argv, streams));
    return 0;
  } catch (failure) {
    if (failure instanceof UsageError) {
      streams.writeError(`${failure.message}\nundercurve --help tells more.\n`);
      return 2;
    }
    if (failure instanceof InputError || failure instanceof CellErrorPassed) {
      streams.writeError(`${failure.message}\n`);
      return 1;
    }
    throw failure;
  }
}

function answer(argv: readonly string[], streams: Streams): string {
  const { values, positionals } = parse(argv);
  const [command, ...rest] = positionals;
  if (values.help) return HELP;
  if (values.version) return `${packageJson.version}\n`;
  if (values.json && command !== 'functions') {
    throw new UsageError('--json: belongs to the command functions; leave it out.');
  }
  switch (command) {
    case 'call':
      return call(rest, streams);
    case 'functions':
      if (rest.length > 0) {
        throw new UsageError(`functions: "${rest.join(' ')}" is too much; give nothing after it.`);
      }
      return values.json ? functionsAsJson() : functionsAsText();
    case undefined:
      throw new UsageError('Command: none is given; give call or functions.');
    default:
      throw new UsageError(`Command: "${command}" is unknown; give call or functions.`);
  }
}

function parse(argv: readonly string[]) {
  try {
    return parseArgs({
      args: [...argv],
      allowPositionals: true,
      options: {
        help: { type: 'boolean', short: 'h' },
        version: { type: 'boolean' },
        json: { type: 'boolean' },
      },
    });
  } catch (failure) {
    throw new UsageError(failure instanceof Error ? failure.message : String(failure));
  }
}

function call(rest: readonly string[], streams: Streams): string {
  const [name, source, ...more] = rest;
  if (name === undefined || source === undefined || more.length > 0) {
    throw new UsageError(
      `call: ${rest.length} words follow it; give a function and one JSON array of its arguments.`,
    );
  }
  const result = entryNamed(name).call(rangesFromJson(textOf(source, streams)));
  return cellsToJson(result);
}

function entryNamed(name: string): CatalogueEntry {
  const [head, ...tail] = name.toUpperCase().split('.');
  const wanted = head === namespace ? tail.join('.') : [head, ...tail].join('.');
  const entry = catalogue.find((candidate) => candidate.name === wanted);
  if (entry === undefined) {
    const known = catalogue.map((candidate) => candidate.name).join(', ');
    throw new UsageError(`Function: "${name}" is unknown; give one of ${known}.`);
  }
  return entry;
}

function textOf(source: string, streams: Streams): string {
  if (source !== '-' && !source.startsWith('@')) return source;
  const file = source === '-' ? '-' : source.slice(1);
  try {
    return streams.read(file);
  } catch (failure) {
    const reason = failure instanceof Error ? failure.message : String(failure);
    throw new UsageError(
      `Arguments: "${source}" cannot be read (${reason}); give a file that can.`,
    );
  }
}

function functionsAsJson(): string {
  const list = catalogue.map(({ name, description, parameters }) => ({
    name: `${namespace}.${name}`,
    description,
    parameters,
  }));
  return `${JSON.stringify(list, null, 2)}\n`;
}

function functionsAsText(): string {
  return catalogue
    .map(({ name, description, parameters }) => {
      const signature = parameters.map((parameter) => {
        const shown = parameter.repeating ? `${parameter.name}…` : parameter.name;
        return parameter.optional ? `[${shown}]` : shown;
      });
      const help = parameters.map((parameter) => `  ${parameter.name}: ${parameter.description}\n`);
      return `${namespace}.${name}(${signature.join(', ')})\n  ${description}\n${help.join('')}`;
    })
    .join('\n');
}
