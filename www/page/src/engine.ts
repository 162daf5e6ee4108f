/** The engine in its own thread: the newest text wins, a crash costs one evaluation and never the sheet. */
import workerSource from "../generated/worker.txt";
import type { Report } from "./report.js";

export type FromWorker =
  | { ready: true; module: WebAssembly.Module }
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
  /** The compiled engine, for what the page itself asks of it. */
  readonly module: Promise<WebAssembly.Module>;
  #compiled: (module: WebAssembly.Module) => void = () => {};
  #events: EngineEvents;
  #packed: string;
  #module: WebAssembly.Module | null = null;
  #worker: Worker | null = null;
  #running: number | null = null;
  #waiting: { serial: number; text: string } | null = null;
  #timer = 0;

  /** Starts the engine from the packed bytes in the page. */
  constructor(packed: string, events: EngineEvents) {
    this.#events = events;
    this.#packed = packed;
    this.module = new Promise((resolve) => (this.#compiled = resolve));
    this.#renew();
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
    this.#renew();
    if (serial !== null) this.#events.failure("Stopped. The values are those from before.", serial);
  }

  /** A thread of its own; until its engine is ready it keeps the text that it is given. */
  #renew(): void {
    const source = new Blob([workerSource], { type: "text/javascript" });
    const address = URL.createObjectURL(source);
    const worker = new Worker(address);
    URL.revokeObjectURL(address);
    worker.onmessage = (event: MessageEvent<FromWorker>) => this.#hear(worker, event.data);
    worker.onerror = (event) => this.#crash(event.message);
    worker.postMessage(this.#module ? { module: this.#module } : { packed: this.#packed });
    this.#worker = worker;
    this.#next();
  }

  #hear(worker: Worker, message: FromWorker): void {
    if ("ready" in message) {
      performance.mark("engine ready");
      this.#module = message.module;
      this.#compiled(message.module);
    } else if ("failure" in message) {
      worker.terminate();
      this.#crash(message.failure, message.serial);
    } else {
      this.#settle();
      // The next text is on its way before this report is drawn.
      this.#next();
      this.#events.report(message.report, message.serial);
    }
  }

  #crash(message: string, of?: number): void {
    const serial = of ?? this.#running ?? 0;
    this.#worker = null;
    this.#settle();
    // An engine that could not be unpacked will not be at the next try either.
    if (serial !== 0 || this.#module) this.#renew();
    this.#events.failure(message, serial);
  }

  #next(): void {
    if (!this.#worker || this.#running !== null || !this.#waiting) return;
    const next = this.#waiting;
    this.#waiting = null;
    this.#running = next.serial;
    this.#timer = window.setTimeout(() => this.#events.busy(true), BUSY_AFTER_MS);
    this.#worker.postMessage(next);
  }

  #settle(): void {
    window.clearTimeout(this.#timer);
    this.#running = null;
    this.#events.busy(false);
  }
}
