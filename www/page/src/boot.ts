/** What runs first, before the engine's bytes have been read: the engine's thread is started. */
import workerSource from "../generated/worker.txt";

performance.mark("script");
// Nothing here talks to anybody. The policy in the head cannot close this door, so it is taken off its hinges.
Reflect.deleteProperty(window, "RTCPeerConnection");

/** A thread with the engine's code, still without the engine itself. */
window.pitchwrightThread = () => {
  const address = URL.createObjectURL(new Blob([workerSource], { type: "text/javascript" }));
  const worker = new Worker(address);
  URL.revokeObjectURL(address);
  return worker;
};
window.pitchwrightFirst = window.pitchwrightThread();
