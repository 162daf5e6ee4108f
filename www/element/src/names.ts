/** What the package gives, in a browser and in Node alike. */
export { SheetError } from "./errors.js";
export { catalogue, load, openSheet } from "./open.js";
export type { Limits, OpenOptions, Progress, StopSignal } from "./open.js";
export type { EngineSource } from "./source.js";
export type { Sheet } from "./sheet.js";
export type { Columns, Labels, Setting } from "./sheet.js";
export type { WorkerSheet } from "./far.js";
export type * from "./types.js";
