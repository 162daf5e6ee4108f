/** The engine's thread: takes a text, gives its report, then its drawings, and answers what the page asks of it. */
import { catalogue, Desk, difference, initSync, last_panic } from "../generated/engine.js";
import type { Answers, FromWorker, Question, ToWorker } from "./engine.js";

/** Drawings wait this long for the next key. */
const DRAW_AFTER_MS = 60;

const answer = (message: FromWorker, transfer: Transferable[] = []) => self.postMessage(message, { transfer });

let desk: Desk | null = null;
/** What came before the engine was there. */
let waiting: ToWorker[] = [];
let drawing = 0;

self.onmessage = (event: MessageEvent<ToWorker>) => {
  const message = event.data;
  if ("packed" in message) {
    compile(message.packed).then(begin, (error: unknown) => answer({ serial: 0, failure: String(error) }));
  } else if ("module" in message) {
    begin(message.module);
  } else if (desk) {
    take(desk, message);
  } else {
    waiting.push(message);
  }
};

/** The engine is unpacked here, beside the page that is being laid out. */
async function compile(packed: string): Promise<WebAssembly.Module> {
  const gunzip = new DecompressionStream("gzip");
  const writer = gunzip.writable.getWriter();
  void writer.write(bytesOf(packed));
  void writer.close();
  return WebAssembly.compileStreaming(new Response(gunzip.readable, { headers: { "content-type": "application/wasm" } }));
}

function bytesOf(base64: string): Uint8Array<ArrayBuffer> {
  const modern = Uint8Array as unknown as { fromBase64?: (text: string) => Uint8Array<ArrayBuffer> };
  return modern.fromBase64?.(base64) ?? Uint8Array.from(atob(base64), (byte) => byte.charCodeAt(0));
}

function begin(module: WebAssembly.Module): void {
  initSync({ module });
  desk = new Desk();
  for (const message of waiting) take(desk, message);
  waiting = [];
  // The page's own highlighting is less urgent than the first values.
  answer({ ready: true, module });
}

function take(at: Desk, message: ToWorker): void {
  if ("text" in message) work(at, message.serial, message.text, message.sheets);
  else if ("question" in message) reply(at, message.id, message.question);
}

function work(at: Desk, serial: number, text: string, sheets: Record<string, string> | null): void {
  clearTimeout(drawing);
  try {
    const json = at.take(text, sheets);
    const numbers = at.numbers();
    answer({ serial, json, numbers }, [numbers.buffer]);
    drawing = self.setTimeout(() => draw(at, serial), DRAW_AFTER_MS);
  } catch (error) {
    answer({ serial, failure: last_panic() ?? String(error) });
  }
}

function draw(at: Desk, serial: number): void {
  try {
    answer({ serial, drawings: at.drawings() });
  } catch (error) {
    answer({ serial, failure: last_panic() ?? String(error) });
  }
}

function reply(at: Desk, id: number, question: Question): void {
  try {
    answer({ id, answer: replied(at, question) });
  } catch (error) {
    const broken = last_panic();
    answer(broken ? { serial: 0, failure: broken } : { id, refused: String(error) });
  }
}

function replied(at: Desk, question: Question): Answers[Question["kind"]] {
  switch (question.kind) {
    case "trail":
      return JSON.parse(at.trail(question.symbol, question.condition)) as Answers["trail"];
    case "complete":
      return JSON.parse(at.complete(question.text, question.line, question.column)) as Answers["complete"];
    case "hover":
      return JSON.parse(at.hover(question.text, question.line, question.column)) as Answers["hover"];
    case "print":
      return at.print();
    case "catalogue":
      return JSON.parse(catalogue()) as Answers["catalogue"];
    case "difference":
      return JSON.parse(difference(question.old, question.next)) as Answers["difference"];
  }
}
