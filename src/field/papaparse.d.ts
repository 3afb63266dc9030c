/** The part of papaparse 5 used here. Its published types bring Node's and the browser's with them, which the core must not see. */
declare module "papaparse" {
  interface ParserConfig {
    delimiter?: string;
    newline?: string;
    preview?: number;
    /** Split on line ends and delimiters alone; left out, it is so where the text has no quote. */
    fastMode?: boolean;
  }
  interface ParseError {
    code: string;
    /** Index in `data` of the row at fault. */
    row: number;
  }
  interface ParseResult {
    data: string[][];
    errors: ParseError[];
    /** `cursor`: where the text after the last whole row begins. */
    meta: { cursor: number };
  }
  interface Parser {
    parse(input: string, baseIndex: number, ignoreLastRow: boolean): ParseResult;
  }
  const Papa: { Parser: new (config: ParserConfig) => Parser };
  export default Papa;
}
