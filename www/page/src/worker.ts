/** The engine's thread: takes a text, gives its report. */
import { evaluate, initSync, last_panic } from "../generated/engine.js";
import type { FromWorker } from "./engine.js";
import type { Report } from "./report.js";

type ToWorker = { packed: string } | { module: WebAssembly.Module } | { serial: number; text: string };

const answer = (message: FromWorker, transfer: Transferable[] = []) => self.postMessage(message, { transfer });

let ready = false;
/** The text that came before the engine was there. */
let waiting: { serial: number; text: string } | null = null;

self.onmessage = (event: MessageEvent<ToWorker>) => {
  const message = event.data;
  if ("packed" in message) {
    compile(message.packed).then(begin, (error: unknown) => answer({ serial: 0, failure: String(error) }));
  } else if ("module" in message) {
    begin(message.module);
  } else if (ready) {
    work(message.serial, message.text);
  } else {
    waiting = message;
  }
};

/** The engine is unpacked here, beside the page that is being laid out. */
async function compile(packed: string): Promise<WebAssembly.Module> {
  const unpacked = new Blob([bytesOf(packed)]).stream().pipeThrough(new DecompressionStream("gzip"));
  return WebAssembly.compileStreaming(new Response(unpacked, { headers: { "content-type": "application/wasm" } }));
}

function bytesOf(base64: string): Uint8Array<ArrayBuffer> {
  const modern = Uint8Array as unknown as { fromBase64?: (text: string) => Uint8Array<ArrayBuffer> };
  return modern.fromBase64?.(base64) ?? Uint8Array.from(atob(base64), (byte) => byte.charCodeAt(0));
}

function begin(module: WebAssembly.Module): void {
  initSync({ module });
  ready = true;
  const first = waiting;
  waiting = null;
  if (first) work(first.serial, first.text);
  // The page's own highlighting is less urgent than the first values.
  answer({ ready: true, module });
}

function work(serial: number, text: string): void {
  try {
    const report = evaluate(text) as Report;
    answer({ serial, report }, columns(report));
  } catch (error) {
    answer({ serial, failure: last_panic() ?? String(error) });
  }
}

/** The columns of numbers go over to the page without a copy. */
function columns(report: Report): Transferable[] {
  return report.quantities.flatMap(({ values }) => (values instanceof Float64Array ? [values.buffer] : []));
}
