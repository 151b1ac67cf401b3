/** A published source, as it is printed in the methods text. */
export interface Source {
  readonly authors: string;
  readonly year: number;
  readonly title: string;
  readonly place: string;
  readonly doi?: string;
}

/** What a result rests on, so that the report can state its methods without anybody writing them twice. */
export interface Basis {
  /** The stable method name of the result tables. */
  readonly method: string;
  /** One sentence: what is computed. */
  readonly statement: string;
  readonly assumptions: readonly string[];
  readonly sources: readonly Source[];
  /** True where the algebra is ours, after the sources. */
  readonly after: boolean;
}

/** Something that weakens a result. Words for each code stand in the report's table of wordings. */
export interface Caution {
  readonly code: string;
  readonly section?: string;
  readonly subject?: string;
  readonly numbers?: Readonly<Record<string, number | string>>;
}

/** Called between steps of long work; throws when the caller wants it to stop. */
export type Progress = (step: string, done: number, total: number) => void;

export type Outcome =
  | "closed"
  | "open"
  | "leaves-section"
  | "in-hiatus"
  | "empty"
  | "undefined"
  | "not-applicable";
