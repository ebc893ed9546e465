/**
 * The tree of a formula, as the rest of the engine sees it.
 * `at` is the position of a part in the text, counted in characters from 1.
 */
export type Tree =
  | { readonly kind: 'number'; readonly value: number; readonly at: number }
  | { readonly kind: 'truth'; readonly value: boolean; readonly at: number }
  | { readonly kind: 'text'; readonly value: string; readonly at: number }
  | { readonly kind: 'name'; readonly name: string; readonly isCell: boolean; readonly at: number }
  | { readonly kind: 'array'; readonly rows: readonly (readonly Tree[])[]; readonly at: number }
  | {
      readonly kind: 'let';
      readonly bindings: readonly Binding[];
      readonly body: Tree;
      readonly at: number;
    }
  | {
      readonly kind: 'lambda';
      readonly params: readonly string[];
      readonly body: Tree;
      readonly at: number;
    }
  | {
      readonly kind: 'call';
      readonly callee: Tree | string;
      readonly args: readonly (Tree | null)[];
      readonly at: number;
    }
  | {
      readonly kind: 'operator';
      readonly operator: string;
      readonly args: readonly Tree[];
      readonly at: number;
      /** Where the operator itself stands. */
      readonly operatorAt: number;
    };

interface Binding {
  readonly name: string;
  readonly value: Tree;
  readonly at: number;
}
