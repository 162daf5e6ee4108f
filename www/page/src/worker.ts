/** The engine's thread: takes a text, gives its report. */
import { evaluate, initSync, last_panic } from "../generated/engine.js";
import type { FromWorker } from "./engine.js";
import type { Report } from "./report.js";

type ToWorker = { module: WebAssembly.Module } | { serial: number; text: string };

const answer = (message: FromWorker, transfer: Transferable[] = []) => self.postMessage(message, { transfer });

self.onmessage = (event: MessageEvent<ToWorker>) => {
  const message = event.data;
  if ("module" in message) {
    initSync({ module: message.module });
    answer({ ready: true });
  } else {
    work(message.serial, message.text);
  }
};

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
