import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { InputError } from "../../src/errors.ts";
import { parseJson } from "../../src/plan/json-text.ts";

describe("JSON text", () => {
  test.each([
    ["", 1, "a value stands here; found the end of the text at column 1"],
    ['{\n  "a": }', 2, 'a value stands here; found "}" at column 8'],
    ['{"a": 1,}', 1, 'no comma stands before }; found "}" at column 9'],
    ["[1,\n2,\n]", 3, 'no comma stands before ]; found "]" at column 1'],
    ['{"a" 1}', 1, 'a colon follows the key "a"; found "1" at column 6'],
    ["{a: 1}", 1, 'a key in double quotes stands here; found "a" at column 2'],
    ["{'a': 1}", 1, "a key in double quotes stands here; found \"'a'\" at column 2"],
    ['{"a": 1 "b": 2}', 1, 'a comma or } stands here; found "\\"" at column 9'],
    ["[1 2]", 1, 'a comma or ] stands here; found "2" at column 4'],
    ['{"a": "b\n"}', 1, "a text ends with a double quote on its own line"],
    ['["\\x"]', 1, "a backslash escapes one of"],
    ['["\\u12"]', 1, "a backslash escapes one of"],
    ['{"a": 1}\r\n{', 2, 'the text ends after its value; found "{" at column 1'],
    ['{"a": 1,\r\n "b": 2,\r\n "a": 3}', 3, 'a key stands once in its object, and "a" stands twice'],
    ['// note\n{"a": 1}', 1, 'a value stands here; found "//" at column 1'],
    ["[01]", 1, 'a comma or ] stands here; found "1" at column 3'],
    ["[+1]", 1, 'a value stands here; found "+1" at column 2'],
    ["[NaN]", 1, 'a value stands here; found "NaN" at column 2'],
    ["[.5]", 1, 'a value stands here; found ".5" at column 2'],
    ["[1e999]", 1, "a number is below 1.8e308"],
    ["[".repeat(100), 1, "lists and objects are nested at most 64 deep"],
    ['{"a": 1', 1, "a comma or } stands here; found the end of the text at column 8"],
  ])("%j is refused at line %d: %s", (text, line, rule) => {
    const reading = () => parseJson(text, "run.plan.json");
    expect(reading).toThrow(InputError);
    expect(reading).toThrow(`run.plan.json, line ${line}: the text is not JSON: ${rule}`);
  });

  test("a byte order mark before the text is left out", () => {
    expect(parseJson('\ufeff{"a": 1}')).toEqual({ a: 1 });
  });

  test("the key __proto__ is a key like any other", () => {
    expect(Object.keys(parseJson('{"__proto__": 1}') as object)).toEqual(["__proto__"]);
  });

  test("all that JSON.stringify writes is read back", () => {
    fc.assert(
      fc.property(fc.jsonValue({ stringUnit: "binary" }), fc.constantFrom(0, 2, "\t"), (value, indent) => {
        const text = JSON.stringify(value, null, indent);
        expect(parseJson(text)).toEqual(JSON.parse(text));
      }),
      { numRuns: 1000 },
    );
  });

  test("a mutated text is read as JSON.parse reads it, or both refuse it, but for a key given twice and an infinite number", () => {
    const whole = JSON.stringify(
      { a: [1.5e3, -2, true, null, "x\\u00e9\n"], "b c": { d: {}, e: [] } },
      null,
      1,
    );
    const piece = fc.constantFrom(...'{}[]:,"\\-+.eE01 \n\ttrufalsn/\u0000\u007f\u2028');
    fc.assert(
      fc.property(fc.nat(whole.length), fc.nat(3), fc.array(piece, { maxLength: 3 }), (at, cut, added) => {
        const text = whole.slice(0, at) + added.join("") + whole.slice(at + cut);
        let ours: unknown;
        try {
          ours = parseJson(text);
        } catch (error) {
          expect(error).toBeInstanceOf(InputError);
          if (/stands twice|below 1\.8e308/.test((error as Error).message)) return;
          expect(() => JSON.parse(text)).toThrow(SyntaxError);
          return;
        }
        expect(ours).toEqual(JSON.parse(text));
      }),
      { numRuns: 5000 },
    );
  });
});
