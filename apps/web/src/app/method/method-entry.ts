import type { SourceId } from './sources';

export type EntryKind = 'angle' | 'measure' | 'statistic';

/** How one figure is computed, in words. The pages that explain a figure and the method page read the same entry. */
export interface MethodEntry {
  readonly name: string;
  readonly kind: EntryKind;
  /** One sentence: what it is. */
  readonly what: string;
  /** The formula in words, step by step. */
  readonly steps: readonly string[];
  /** The same as a formula, where that is shorter than words. */
  readonly written?: string;
  readonly symbols?: readonly (readonly [symbol: string, meaning: string])[];
  readonly unit: string;
  /** What a positive and a negative value mean. */
  readonly sign?: string;
  /** What the ± or the interval beside it means. */
  readonly interval: string;
  readonly sources: readonly CitedSource[];
  /** What it cannot say. */
  readonly limits: readonly string[];
}

export interface CitedSource {
  readonly source: SourceId;
  /** Section, equation or page, and what is taken from it. */
  readonly where: string;
}
