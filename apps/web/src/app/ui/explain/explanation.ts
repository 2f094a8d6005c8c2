/** A figure opened up: what it is, what went in, and how far it can be trusted. All numbers come with the figure. */
export interface Explanation {
  /** Name of its entry in the method's catalogue. */
  readonly entry: string;
  /** What exactly is explained: `Right arm, frame 212`. */
  readonly of: string;
  /** The figure as the page shows it, or why there is none. */
  readonly result: string;
  /** The 95 % interval in words; null where there is none. */
  readonly interval: string | null;
  readonly inputs: readonly ExplainedInput[];
  readonly frames: readonly ExplainedFrame[];
  /** What the uncertainty is made of, largest first. */
  readonly parts: readonly ExplainedPartWords[];
  /** What the parts are parts of: `the uncertainty of this stroke’s figure`. */
  readonly partsOf: string;
  /** Further entries that went into it. */
  readonly also: readonly string[];
}

export interface ExplainedInput {
  readonly name: string;
  readonly value: string;
}

/** A frame on the Desk. */
export interface ExplainedFrame {
  readonly clipId: string;
  readonly frame: number;
  /** null: of both arms. */
  readonly arm: 'left' | 'right' | null;
  readonly says: string;
}

export interface ExplainedPartWords {
  readonly name: string;
  /** What it would leave alone: `± 1.2°`. */
  readonly alone: string;
  /** Share of the squares, 0–1. */
  readonly share: number;
}

/** Makes the explanation when it is asked for: at once, or from an answer of the server; null when the figure is gone. */
export type Explain = () => Explanation | Promise<Explanation> | null;
