declare module "papaparse" {
  interface ParseError {
    readonly type: string;
    readonly code: string;
    readonly message: string;
    readonly row?: number;
  }
  interface ParseResult {
    readonly data: string[][];
    readonly errors: readonly ParseError[];
  }
  interface ParseOptions {
    readonly delimiter: string;
    readonly quoteChar: string;
    readonly escapeChar: string;
    readonly newline: "\n";
    readonly skipEmptyLines: false;
  }
  const Papa: { parse(text: string, options: ParseOptions): ParseResult };
  export default Papa;
}
