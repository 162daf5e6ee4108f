/** The engine in its own thread: the newest text wins, a crash costs one evaluation and never the sheet. */
import workerSource from "../generated/worker.txt";
import type { Report } from "./report.js";

export type FromWorker =
  | { ready: true }
  | { serial: number; report: Report }
  | { serial: number; failure: string };

export interface EngineEvents {
  /** The report of the text that was given as `serial`. */
  report(report: Report, serial: number): void;
  /** The engine broke off on the text given as `serial`. */
  failure(message: string, serial: number): void;
  /** An evaluation has been running for a while, or no longer is. */
  busy(busy: boolean): void;
}

/** After this long an evaluation is shown to be running, with a way to stop it. */
const BUSY_AFTER_MS = 200;

export class Engine {
  readonly module: Promise<WebAssembly.Module>;
  #events: EngineEvents;
  #worker: Worker | null = null;
  #running: number | null = null;
  #waiting: { serial: number; text: string } | null = null;
  #timer = 0;

  /** Starts the engine from the packed bytes in the page. */
  constructor(packed: string, events: EngineEvents) {
    this.#events = events;
    this.module = compile(packed);
    // The thread starts while the engine is still being unpacked.
    void this.#renew();
    this.module.catch((error: unknown) => events.failure(String(error), 0));
  }

  /** Evaluates `text` as soon as the thread is free; a text that was still waiting is passed over. */
  evaluate(serial: number, text: string): void {
    this.#waiting = { serial, text };
    this.#next();
  }

  /** Breaks off what is running and goes on with what waits. */
  stop(): void {
    const serial = this.#running;
    this.#worker?.terminate();
    this.#worker = null;
    this.#settle();
    void this.#renew();
    if (serial !== null) this.#events.failure("Stopped. The values are those from before.", serial);
  }

  async #renew(): Promise<void> {
    const source = new Blob([workerSource], { type: "text/javascript" });
    const address = URL.createObjectURL(source);
    const worker = new Worker(address);
    URL.revokeObjectURL(address);
    worker.onmessage = (event: MessageEvent<FromWorker>) => this.#hear(worker, event.data);
    worker.onerror = (event) => this.#crash(event.message);
    const module = await this.module.catch(() => null);
    if (module) worker.postMessage({ module });
  }

  #hear(worker: Worker, message: FromWorker): void {
    if ("ready" in message) {
      performance.mark("engine ready");
      this.#worker = worker;
      this.#next();
    } else if ("failure" in message) {
      worker.terminate();
      this.#crash(message.failure);
    } else {
      this.#settle();
      // The next text is on its way before this report is drawn.
      this.#next();
      this.#events.report(message.report, message.serial);
    }
  }

  #crash(message: string): void {
    const serial = this.#running ?? 0;
    this.#worker = null;
    this.#settle();
    void this.#renew();
    this.#events.failure(message, serial);
  }

  #next(): void {
    if (!this.#worker || this.#running !== null || !this.#waiting) return;
    this.#running = this.#waiting.serial;
    this.#worker.postMessage(this.#waiting);
    this.#waiting = null;
    this.#timer = window.setTimeout(() => this.#events.busy(true), BUSY_AFTER_MS);
  }

  #settle(): void {
    window.clearTimeout(this.#timer);
    this.#running = null;
    this.#events.busy(false);
  }
}

async function compile(packed: string): Promise<WebAssembly.Module> {
  const unpacked = new Blob([bytesOf(packed)]).stream().pipeThrough(new DecompressionStream("gzip"));
  const headers = { "content-type": "application/wasm" };
  const module = await WebAssembly.compileStreaming(new Response(unpacked, { headers }));
  performance.mark("engine compiled");
  return module;
}

function bytesOf(base64: string): Uint8Array<ArrayBuffer> {
  const modern = Uint8Array as unknown as { fromBase64?: (text: string) => Uint8Array<ArrayBuffer> };
  return modern.fromBase64?.(base64) ?? Uint8Array.from(atob(base64), (byte) => byte.charCodeAt(0));
}
