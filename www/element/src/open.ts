/** The ways in: a sheet is opened, the catalogue is asked for. */
import { engine, module } from "./engine.js";
import { SheetError, finding } from "./errors.js";
import { WorkerSheet } from "./far.js";
import { Sheet } from "./sheet.js";
import type { EngineSource } from "./source.js";
import type { Catalogue } from "./types.js";

/** Limits that may be lowered. They are counted, so every machine stops at the same place. */
export interface Limits {
  /** The most operations in a recalculation. */
  readonly operations?: number;
}

/** How far the opening of a sheet is. */
export interface Progress {
  /** The engine is loaded, the sheet is worked out, it is open. */
  readonly stage: "loading" | "working" | "done";
  /** Milliseconds since the sheet was to be opened. */
  readonly elapsed: number;
}

/** What an `AbortController` gives. */
export interface StopSignal {
  readonly aborted: boolean;
  readonly reason?: unknown;
  addEventListener(type: "abort", listener: () => void, options?: { once?: boolean }): void;
  removeEventListener(type: "abort", listener: () => void): void;
}

/** How a sheet is to be opened. */
export interface OpenOptions {
  /** The texts of other sheets by the names by which they are used. */
  readonly sheets?: Readonly<Record<string, string>>;
  readonly limits?: Limits;
  /** Stops the opening. With `worker` it also breaks off a call at any later time, and closes the sheet. */
  readonly signal?: StopSignal;
  /** Is told how far the opening is; with `worker` several times a second. */
  readonly onProgress?: (progress: Progress) => void;
  /** Whether the sheet is to live in a thread of its own. */
  readonly worker?: boolean;
}

/** With `worker`, how often progress is told. */
const TELL_EVERY_MS = 200;

/**
 * Opens a sheet: reads, checks and works it out. A faulty sheet opens too; what is wrong with it stands among the findings
 * of its result.
 */
export function openSheet(text: string, options?: OpenOptions & { readonly worker?: false }): Promise<Sheet>;
export function openSheet(text: string, options: OpenOptions & { readonly worker: true }): Promise<WorkerSheet>;
export function openSheet(text: string, options?: OpenOptions): Promise<Sheet | WorkerSheet>;
export async function openSheet(text: string, options: OpenOptions = {}): Promise<Sheet | WorkerSheet> {
  if (typeof text !== "string") throw new TypeError("the text of a sheet is a string");
  const { signal } = options;
  stopIf(signal);
  const start = performance.now();
  const tell = (stage: Progress["stage"]) => options.onProgress?.({ stage, elapsed: performance.now() - start });
  tell("loading");
  const opened = options.worker ? await openFar(text, options, tell) : await openNear(text, options, tell);
  tell("done");
  return opened;
}

async function openNear(text: string, options: OpenOptions, tell: (stage: "working") => void): Promise<Sheet> {
  const glue = await engine();
  stopIf(options.signal);
  tell("working");
  return new Sheet(glue, new glue.OpenSheet(text, { ...options.sheets }, options.limits?.operations));
}

async function openFar(text: string, options: OpenOptions, tell: (stage: "working") => void): Promise<WorkerSheet> {
  const code = await module();
  const { signal } = options;
  stopIf(signal);
  const sheet = new WorkerSheet(code);
  signal?.addEventListener("abort", () => sheet.close(reasonOf(signal)), { once: true });
  tell("working");
  const clock = setInterval(() => tell("working"), TELL_EVERY_MS);
  try {
    await sheet.open(text, { ...options.sheets }, options.limits?.operations);
    return sheet;
  } catch (error) {
    sheet.close(error);
    throw error;
  } finally {
    clearInterval(clock);
  }
}

function stopIf(signal: StopSignal | undefined): void {
  if (signal?.aborted) throw reasonOf(signal);
}

function reasonOf(signal: StopSignal): unknown {
  return signal.reason ?? new SheetError(finding("stopped", "The sheet was stopped."));
}

/** The rows of all functions, units, statements and signs of the language. */
export async function catalogue(): Promise<Catalogue> {
  const glue = await engine();
  return JSON.parse(glue.catalogue()) as Catalogue;
}

/** Loads the engine beforehand, or from another place than beside the package. Otherwise it is loaded when it is needed. */
export async function load(source?: EngineSource): Promise<void> {
  await engine(source);
}
