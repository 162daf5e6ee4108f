/** What the scripts of the page hand on to each other. */
interface Window {
  /** Starts a thread of the engine. */
  pitchwrightThread: () => Worker;
  /** The thread that was started first, until it is taken. */
  pitchwrightFirst?: Worker | undefined;
  /** The parts of the page that are unpacked after the first values. */
  pitchwrightLater?: typeof import("./later.js");
}
