import { PACES } from "../shell/plan-words.ts";
import type { InputError } from "../worker/core.ts";
import { craftLabel, fieldLabel, fileKeyLabel, type NamedParts } from "./field-labels.ts";

const NO_NAMES: NamedParts = { routes: [] };

/** What is wrong with a plan or its craft's file, with its place called as the page labels it. */
export function toldByLabel(fault: InputError, parts = NO_NAMES): string {
  const { file = "", line, key = "" } = fault.place;
  const rule = wordsOf(fault.sentence, parts);
  const label = file === "" ? fieldLabel(key, parts) : fileKeyLabel(key);
  if (label === null) return key === "" ? wordsOf(fault.message, parts) : fault.message;
  const where = [...(file === "" ? [] : [file]), ...(line === undefined ? [] : [`line ${line}`])];
  const before = where.length === 0 ? "" : `${where.join(", ")}: `;
  const { predicate } = fault;
  return before + label + (predicate === null ? `: ${rule}` : wordsOf(predicate, parts));
}

/** The same of a craft, for a place right below the field: a sentence about the field itself calls it by its label. */
export function toldBelowField(fault: InputError): string {
  const label = craftLabel(fault.place.key ?? "");
  return label === null || fault.predicate === null ? fault.sentence : label + fault.predicate;
}

/** Keys that sentences speak of beside their own. */
const KEYS = /\b(?:routes|alternates|whatIf)\[\d+\]|\b(?:notBefore|notAfter|arriveBy|specificConsumption)\b/g;

const WHOLE: Readonly<Record<string, string>> = {
  notBefore: '"Not before"',
  notAfter: '"Not after"',
  arriveBy: '"Arrive by"',
  specificConsumption: '"Specific consumption"',
};

/** A sentence with the keys in it called as the page calls them; what stands in quotes is the user's, but for a rule of pace. */
function wordsOf(sentence: string, parts: NamedParts): string {
  return sentence
    .replace(/\bthe pace "([\w-]+)"/g, (found, hold) => {
      const words = PACES.find(([rule]) => rule === hold)?.[1];
      return words === undefined ? found : `the pace "${words}"`;
    })
    .split(/("(?:[^"\\]|\\.)*")/)
    .map((text, at) =>
      at % 2 === 1 ? text : text.replace(KEYS, (key) => WHOLE[key] ?? fieldLabel(key, parts) ?? key),
    )
    .join("");
}
