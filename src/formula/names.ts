/**
 * Names in a formula: how they are compared, what they can stand for, and where they
 * are visible.
 */
import type { Row } from './row';
import type { Tree } from './tree';

/** What a name can stand for: a step, an array of steps, or a function of the formula's own or of the givens. */
export type Value =
  | { readonly kind: 'step'; readonly step: number }
  | { readonly kind: 'array'; readonly rows: readonly (readonly number[])[] }
  | {
      readonly kind: 'function';
      readonly params: readonly string[];
      readonly body: Tree;
      readonly scope: Scope;
    }
  | { readonly kind: 'row'; readonly row: Row };

/**
 * The form in which names are compared: without case; cell addresses without `$` and
 * without quotes around the sheet, so that `'Sheet1'!$B$2` is Sheet1!B2.
 */
export function nameKey(name: string): string {
  const key = name.toUpperCase();
  const end = key.lastIndexOf('!');
  if (end < 0) return key.replace(/\$/g, '');
  const [, quoted] = /^'(.*)'$/.exec(key.slice(0, end)) ?? [];
  const sheet = quoted?.replace(/''/g, "'") ?? key.slice(0, end);
  return `${sheet}!${key.slice(end + 1).replace(/\$/g, '')}`;
}

/** Names visible at a place, innermost first. */
export class Scope {
  private readonly values = new Map<string, Value>();

  constructor(private readonly outer?: Scope) {}

  find(key: string): Value | undefined {
    // eslint-disable-next-line @typescript-eslint/no-this-alias
    for (let scope: Scope | undefined = this; scope; scope = scope.outer) {
      const value = scope.values.get(key);
      if (value) return value;
    }
    return undefined;
  }

  set(key: string, value: Value): void {
    this.values.set(key, value);
  }
}

/** True if the body of a LAMBDA bound to `name` uses that name. */
export function callsItself(name: string, body: Tree): boolean {
  const key = nameKey(name);
  // A list of what is left, since a long sum is a deep tree.
  const parts: (Tree | string | null)[] = [body];
  for (;;) {
    const part = parts.pop();
    if (part === undefined) return false;
    if (typeof part === 'string') {
      if (nameKey(part) === key) return true;
    } else if (part !== null) parts.push(...partsOf(part));
  }
}

function partsOf(tree: Tree): readonly (Tree | string | null)[] {
  switch (tree.kind) {
    case 'name':
      return [tree.name];
    case 'call':
      return [tree.callee, ...tree.args];
    case 'operator':
      return tree.args;
    case 'array':
      return tree.rows.flat();
    case 'let':
      return [...tree.bindings.map((binding) => binding.value), tree.body];
    case 'lambda':
      return [tree.body];
    default:
      return [];
  }
}
