/** The engine in its own thread: the newest text wins, a crash costs one evaluation and never the sheet. */
import type { Catalogue, Completions, Differences, Hover, Trail } from "./answers.js";
import { unpacked, type Drawings, type Report } from "./report.js";

/** What the page asks besides a report. */
export type Question =
  | { kind: "trail"; symbol: string; condition: Record<string, string> }
  | { kind: "complete" | "hover"; text: string; line: number; column: number }
  | { kind: "print" }
  | { kind: "catalogue" }
  | { kind: "difference"; old: string; next: string };

/** What is answered to each. */
export interface Answers {
  trail: Trail;
  complete: Completions | null;
  hover: Hover | null;
  print: string;
  catalogue: Catalogue;
  difference: Differences;
}

export type ToWorker =
  | { packed: string }
  | { module: WebAssembly.Module }
  | { serial: number; text: string; sheets: Record<string, string> | null }
  | { id: number; question: Question };

export type FromWorker =
  | { ready: true; module: WebAssembly.Module }
  | { serial: number; json: string; numbers: Float64Array }
  | { serial: number; drawings: string }
  | { id: number; answer: Answers[keyof Answers] }
  | { id: number; refused: string }
  | { serial: number; failure: string };

export interface EngineEvents {
  /** The report of the text that was given as `serial`. */
  report(report: Report, serial: number): void;
  /** Its drawings, which come after it. */
  drawings(drawings: Drawings, serial: number): void;
  /** The engine broke off on the text given as `serial`. */
  failure(message: string, serial: number): void;
  /** An evaluation has been running for a while, or no longer is. */
  busy(busy: boolean): void;
}

/** After this long an evaluation is shown to be running, with a way to stop it. */
const BUSY_AFTER_MS = 200;

interface Asked {
  answered: (answer: never) => void;
  refused: (why: Error) => void;
}

export class Engine {
  /** The compiled engine, for what the page itself asks of it. */
  readonly module: Promise<WebAssembly.Module>;
  #compiled: (module: WebAssembly.Module) => void = () => {};
  #events: EngineEvents;
  #packed: string;
  #module: WebAssembly.Module | null = null;
  #worker: Worker | null = null;
  #running: number | null = null;
  #waiting: { serial: number; text: string; sheets: Record<string, string> | null } | null = null;
  #asked = new Map<number, Asked>();
  #questions = 0;
  #timer = 0;

  /** Starts the engine from the packed bytes in the page. */
  constructor(packed: string, events: EngineEvents) {
    this.#events = events;
    this.#packed = packed;
    this.module = new Promise((resolve) => (this.#compiled = resolve));
    this.#renew();
  }

  /** Evaluates `text` as soon as the thread is free; a text that was still waiting is passed over. */
  evaluate(serial: number, text: string, sheets: Record<string, string> | null): void {
    this.#waiting = { serial, text, sheets };
    this.#next();
  }

  /** Asks something about the text last evaluated. */
  ask<K extends Question["kind"]>(question: Question & { kind: K }): Promise<Answers[K]> {
    const id = ++this.#questions;
    return new Promise((answered, refused) => {
      this.#asked.set(id, { answered, refused });
      if (this.#worker) this.#worker.postMessage({ id, question } satisfies ToWorker);
      else refused(new Error("the engine is not running"));
    });
  }

  /** Breaks off what is running and goes on with what waits. */
  stop(): void {
    const serial = this.#running;
    this.#worker?.terminate();
    this.#worker = null;
    this.#settle();
    this.#renew();
    if (serial !== null) this.#events.failure("stopped", serial);
  }

  /** A thread of its own; until its engine is ready it keeps what it is given. */
  #renew(): void {
    for (const { refused } of this.#asked.values()) refused(new Error("the engine was started anew"));
    this.#asked.clear();
    const worker = window.pitchwrightFirst ?? window.pitchwrightThread();
    window.pitchwrightFirst = undefined;
    worker.onmessage = (event: MessageEvent<FromWorker>) => this.#hear(worker, event.data);
    worker.onerror = (event) => this.#crash(event.message);
    worker.postMessage((this.#module ? { module: this.#module } : { packed: this.#packed }) satisfies ToWorker);
    this.#worker = worker;
    this.#next();
  }

  #hear(worker: Worker, message: FromWorker): void {
    if (worker !== this.#worker) return;
    if ("json" in message) {
      this.#settle();
      // The next text is on its way before this report is drawn.
      this.#next();
      this.#events.report(unpacked(message.json, message.numbers), message.serial);
    } else if ("drawings" in message) {
      this.#events.drawings(JSON.parse(message.drawings) as Drawings, message.serial);
    } else if ("answer" in message) {
      this.#answered(message.id)?.answered(message.answer as never);
    } else if ("refused" in message) {
      this.#answered(message.id)?.refused(new Error(message.refused));
    } else if ("ready" in message) {
      performance.mark("engine ready");
      this.#module = message.module;
      this.#compiled(message.module);
    } else {
      worker.terminate();
      this.#crash(message.failure, message.serial);
    }
  }

  #answered(id: number): Asked | undefined {
    const asked = this.#asked.get(id);
    this.#asked.delete(id);
    return asked;
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
    this.#worker.postMessage(next satisfies ToWorker);
  }

  #settle(): void {
    window.clearTimeout(this.#timer);
    this.#running = null;
    this.#events.busy(false);
  }
}
