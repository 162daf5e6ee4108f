/** The package in a browser. */
import source from "../../page/generated/thread.txt";
import { runOn, type Thread } from "./engine.js";
import type { EngineSource } from "./source.js";

runOn({ compile, thread });

async function compile(source: EngineSource | undefined): Promise<WebAssembly.Module> {
  if (source instanceof ArrayBuffer || source instanceof Uint8Array) return WebAssembly.compile(source as BufferSource);
  // A bundler finds the file by these very words, and gives it its new address.
  const address = source ?? new URL("./engine_bg.wasm", import.meta.url);
  const response = await fetch(typeof address === "string" ? address : address.href);
  if (!response.ok) throw new Error(`the engine is not at ${response.url}: ${response.status}`);
  // Only this very type is taken as it streams in, and not every server has it.
  const streams = response.headers.get("content-type") === "application/wasm";
  return streams ? WebAssembly.compileStreaming(response) : WebAssembly.compile(await response.arrayBuffer());
}

/** The thread's script is part of this file, so that no bundler has to find it. */
function thread(): Thread {
  const address = URL.createObjectURL(new Blob([source], { type: "text/javascript" }));
  const worker = new Worker(address);
  URL.revokeObjectURL(address);
  return {
    post: (message) => worker.postMessage(message),
    hear(told, broke) {
      worker.onmessage = (event) => told(event.data);
      worker.onerror = (event) => broke(event.message);
    },
    hold: () => {},
    end: () => worker.terminate(),
  };
}
