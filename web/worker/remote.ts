/*
 * Calls between the page and its workers, or between workers: only what the page needs of such calls, since a library for them
 * would be twice part of the first load.
 */

/** An object whose functions are called from afar: every call answers later. */
export type Remote<Served> = {
  readonly [Name in keyof Served]: Served[Name] extends (...given: infer Given) => infer Answer
    ? (...given: Given) => Promise<Awaited<Answer>>
    : never;
};

interface Endpoint {
  postMessage(message: unknown, transfers: Transferable[]): void;
  addEventListener(type: "message", listener: (event: MessageEvent) => void): void;
  start?(): void;
}

interface Call {
  readonly id: number;
  readonly name: string;
  readonly given: readonly unknown[];
  /** Ports that stand for the functions among what is given, by their place there. */
  readonly callbacks: readonly (readonly [number, MessagePort])[];
}

type Outcome =
  | { readonly value: unknown }
  | { readonly fault: unknown }
  | { readonly error: Pick<Error, "name" | "message" | "stack"> };
type Answer = Outcome & { readonly answers: number };

const handedOver = new WeakMap<object, Transferable[]>();

/** Marks what of a value is handed over instead of copied when it is sent. */
export function handOver<Value extends object>(value: Value, transfers: Transferable[]): Value {
  handedOver.set(value, transfers);
  return value;
}

const transfersOf = (value: unknown): Transferable[] =>
  typeof value === "object" && value !== null ? (handedOver.get(value) ?? []) : [];

/** Answers the calls that come to an endpoint. */
export function serve(served: object, endpoint: Endpoint): void {
  const functions = served as Readonly<Record<string, (...given: unknown[]) => unknown>>;
  const listener = async ({ data }: MessageEvent<Call>): Promise<void> => {
    const { id, name, callbacks } = data;
    if (name === undefined) return;
    const given = [...data.given];
    for (const [place, port] of callbacks) given[place] = (word: unknown) => port.postMessage(word);
    try {
      const asked = functions[name];
      if (asked === undefined) throw new Error(`nothing named ${name} is served`);
      const value = await asked(...given);
      endpoint.postMessage({ answers: id, value } satisfies Answer, transfersOf(value));
    } catch (fault) {
      endpoint.postMessage({ answers: id, ...sendable(fault) } satisfies Answer, []);
    }
  };
  endpoint.addEventListener("message", (event) => void listener(event));
  endpoint.start?.();
}

/** An error loses its class and its own properties on the way, not its name. */
function sendable(fault: unknown): Outcome {
  if (!(fault instanceof Error)) return { fault };
  const { name, message, stack } = fault;
  return { error: { name, message, ...(stack === undefined ? {} : { stack }) } };
}

/** What is served at the other end of an endpoint. Functions among what is given are called with one word, without an answer. */
export function reach<Served>(endpoint: Endpoint): Remote<Served> {
  const waiting = new Map<number, (answer: Answer) => void>();
  let calls = 0;
  endpoint.addEventListener("message", ({ data }: MessageEvent<Answer>) => {
    waiting.get(data.answers)?.(data);
    waiting.delete(data.answers);
  });
  endpoint.start?.();
  const call = (name: string, all: readonly unknown[]): Promise<unknown> =>
    new Promise((resolve, reject) => {
      calls += 1;
      const ports: MessagePort[] = [];
      const callbacks: [number, MessagePort][] = [];
      const given = all.map((each, place) => {
        if (typeof each !== "function") return each;
        const { port1, port2 } = new MessageChannel();
        port1.onmessage = ({ data }) => each(data);
        ports.push(port1);
        callbacks.push([place, port2]);
        return null;
      });
      waiting.set(calls, (answer) => {
        for (const port of ports) port.close();
        if ("error" in answer) reject(Object.assign(new Error(answer.error.message), answer.error));
        else if ("fault" in answer) reject(answer.fault);
        else resolve(answer.value);
      });
      const transfers = [...callbacks.map(([, port]) => port), ...all.flatMap(transfersOf)];
      endpoint.postMessage({ id: calls, name, given, callbacks } satisfies Call, transfers);
    });
  return new Proxy({} as Remote<Served>, {
    // What is awaited is asked for `then`: there is none.
    get: (_, name) =>
      typeof name === "string" && name !== "then" ? (...given: unknown[]) => call(name, given) : undefined,
  });
}
