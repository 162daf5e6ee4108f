/** The engine's own thread. */
import init, { version } from "../generated/engine.js";

self.onmessage = async (event: MessageEvent<WebAssembly.Module>) => {
  await init({ module_or_path: event.data });
  self.postMessage(version());
};
