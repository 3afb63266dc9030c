import { type Command, InvalidArgumentError, type Option } from "commander";
import { messageLine } from "./message.ts";

/** The commands, for messages. */
export const COMMANDS = "estimate, window, inspect, check or demo";

/** Commander's messages that are more than one sentence or name no rule → ours. */
const WORDED: readonly (readonly [RegExp, string])[] = [
  [
    /^option '(--[\w-]+).*?' argument '(.*)' is invalid\. Allowed choices are (.*)$/,
    '$1 takes one of $3; found "$2"',
  ],
  [/^option '(--[\w-]+) <(.*)>' argument missing$/, "$1 takes a value ($2); found nothing"],
  [/^too many arguments for '(\w+)'\. Expected (\d+ arguments?) but got (\d+)$/, "$1 takes $2; found $3"],
  [/^command-argument value '(.*)' is invalid for argument '(\w+)'\. (.*)$/, '<$2> $3; found "$1"'],
];

/** Commander's message in our form: one line that says what is accepted. */
export function usageLine(text: string): string {
  const message = text
    .replace(/^error: /, "")
    .replace(/\s*\n\s*/g, " ")
    .trim()
    .replace(/\.$/, "");
  const [pattern, words] = WORDED.find(([known]) => known.test(message)) ?? [/^/, ""];
  const advice = /^unknown command/.test(message) ? `the command is ${COMMANDS}` : "see legwork --help";
  return messageLine(`${message.replace(pattern, words)}; ${advice}`);
}

/** An argument that names a file or folder: any text but an empty one. */
export function nameOf(what: "a file" | "a folder") {
  return (text: string): string => {
    if (text.trim() === "") throw new InvalidArgumentError(`names ${what}`);
    return text;
  };
}

/** Refuses what would be passed over without a word: an option given twice that is no list, and an option taken for a value. */
export function refuseSlips(command: Command): void {
  const names = new Set(command.options.map(({ long }) => long));
  for (const option of command.options) if (option.required) watch(command, option, names);
}

function watch(command: Command, option: Option, names: ReadonlySet<string | undefined>): void {
  const { long } = option;
  const given: string[] = [];
  command.on(`option:${option.name()}`, (text: string) => {
    if (names.has(text)) command.error(`${long} takes a value; found the option ${text}`);
    const [before] = given;
    if (before !== undefined && !option.description.includes("repeatable"))
      command.error(`${long} is given once; found "${before}" and "${text}"`);
    given.push(text);
  });
}
