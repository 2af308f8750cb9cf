import type { Kind } from './kind';

/** What a formula is once read. Every node knows which characters it came from. */
export interface Span {
  readonly from: number;
  readonly to: number;
}
export type Unary = '-' | 'not';
export type Arithmetic = '+' | '-' | '*' | '/' | '^';
export type Comparison = '<' | '>' | '<=' | '>=' | '=' | '<>';
export type Node = { readonly span: Span } & (
  | { readonly type: 'number'; readonly value: number; readonly unit: 'in' | 'mm' | 'cm' | '°' | null }
  | { readonly type: 'name'; readonly name: string }
  | { readonly type: 'unary'; readonly sign: Unary; readonly of: Node }
  | { readonly type: 'arithmetic'; readonly sign: Arithmetic; readonly left: Node; readonly right: Node }
  | { readonly type: 'comparison'; readonly sign: Comparison; readonly left: Node; readonly right: Node }
  | { readonly type: 'logic'; readonly sign: 'and' | 'or'; readonly left: Node; readonly right: Node }
  | {
      readonly type: 'is';
      readonly choice: string;
      readonly option: string;
      readonly not: boolean;
      readonly optionSpan: Span;
    }
  | { readonly type: 'if'; readonly test: Node; readonly then: Node; readonly otherwise: Node }
  | { readonly type: 'call'; readonly name: string; readonly args: readonly Node[]; readonly nameSpan: Span }
);
export const KEYWORDS: ReadonlySet<string> = new Set(['if', 'then', 'else', 'and', 'or', 'not', 'is']);

/** The names that a formula may use. Names may have spaces; they are compared in lower case. */
export interface Names {
  readonly has: (name: string) => boolean;
  readonly all: () => Iterable<string>;
  /** Options of a choice; undefined when the name is not a choice. */
  readonly options: (name: string) => readonly string[] | undefined;
}
/** What the names in a formula stand for. */
export interface Scope extends Names {
  readonly slot: (name: string) => number;
  readonly kind: (name: string) => Kind;
}

/** Where values live while a formula works: one number a name. */
export type Values = Float64Array;
export type Work = (values: Values) => number;
export interface Formula {
  readonly node: Node;
  readonly kind: Kind;
  readonly work: Work;
  /** Names that the formula reads, without repeats. */
  readonly uses: readonly string[];
}
