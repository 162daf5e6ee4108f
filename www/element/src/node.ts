/** The package in Node. */
import { readFile } from "node:fs/promises";
import { Worker } from "node:worker_threads";
import source from "../../page/generated/thread.txt";
import { runOn, type Thread } from "./engine.js";
import type { EngineSource } from "./source.js";

export * from "./names.js";

runOn({ compile, thread });

async function compile(source: EngineSource | undefined): Promise<WebAssembly.Module> {
  if (source instanceof ArrayBuffer || source instanceof Uint8Array) return WebAssembly.compile(source as BufferSource);
  const address = source ?? new URL("./engine_bg.wasm", import.meta.url);
  return WebAssembly.compile(await readFile(typeof address === "string" ? address : new URL(address.href)));
}

/** What the thread's script finds in a browser. */
const AROUND = `const { parentPort } = require("node:worker_threads");
globalThis.self = globalThis;
self.postMessage = (message) => parentPort.postMessage(message);
parentPort.on("message", (data) => self.onmessage({ data }));
`;

function thread(): Thread {
  const worker = new Worker(AROUND + source, { eval: true });
  worker.unref();
  return {
    post: (message) => worker.postMessage(message),
    hear(told, broke) {
      worker.on("message", told);
      worker.on("error", broke);
    },
    hold: (busy) => (busy ? worker.ref() : worker.unref()),
    end: () => void worker.terminate(),
  };
}
