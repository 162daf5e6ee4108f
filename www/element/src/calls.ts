/** What goes between a sheet in a thread of its own and whoever opened it. */
import type { Finding } from "./types.js";

/** To the thread: first the engine, then a sheet, then what is asked of it. */
export type ToThread =
  | { readonly module: WebAssembly.Module }
  | { readonly id: number; readonly open: { readonly text: string; readonly sheets: Record<string, string>; readonly operations: number | undefined } }
  | { readonly id: number; readonly call: string; readonly given: readonly unknown[] };

/** What every change is answered with. */
export interface State {
  readonly json: string;
  readonly text: string;
  readonly digits: number;
}

/** From the thread. */
export type FromThread =
  | { readonly id: number; readonly value: unknown; readonly state: State | null }
  | { readonly id: number; readonly finding: Finding };
