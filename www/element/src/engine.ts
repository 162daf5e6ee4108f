/** The one engine of a page or process: loaded at the first use, shared by all sheets. */
import * as glue from "../../page/generated/engine.js";
import type { EngineSource } from "./source.js";

/** A thread with a sheet in it. */
export interface Thread {
  post(message: unknown): void;
  hear(told: (message: unknown) => void, broke: (error: unknown) => void): void;
  /** Whether the thread keeps a process from ending. */
  hold(busy: boolean): void;
  end(): void;
}

/** What differs between a browser and Node. */
export interface Platform {
  compile(source: EngineSource | undefined): Promise<WebAssembly.Module>;
  thread(): Thread;
}

let platform: Platform | null = null;
let compiled: Promise<WebAssembly.Module> | null = null;

/** Says where the package runs; the first entry that is loaded does. */
export function runOn(given: Platform): void {
  platform ??= given;
}

/** The compiled engine; it can be given from elsewhere before the first use. */
export function module(source?: EngineSource): Promise<WebAssembly.Module> {
  const at = here();
  compiled ??= at.compile(source).catch((error: unknown) => {
    // A failed loading is no reason to fail for ever.
    compiled = null;
    throw error;
  });
  return compiled;
}

let begun: typeof glue | null = null;

/** The engine's functions. */
export async function engine(source?: EngineSource): Promise<typeof glue> {
  const code = await module(source);
  if (!begun) {
    glue.initSync({ module: code });
    begun = glue;
  }
  return begun;
}

/** A new thread. */
export function thread(): Thread {
  return here().thread();
}

function here(): Platform {
  if (!platform) throw new Error("the package was not entered by its entry");
  return platform;
}
