/**
 * A fault's sentence without the key before it where the sentence begins with that key: `reserve: reserve takes …` says the word twice.
 */
export function saidOnce(fault: string): string {
  return fault.replace(/(^|, )([^\s,:]+): (?=\2 )/, (_, before: string) => (before === "" ? "" : ": "));
}
