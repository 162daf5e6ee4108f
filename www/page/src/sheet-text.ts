/** The sheet's text, which is the only truth, with an undo that reaches over everything. */
import type { Edit } from "./report.js";

interface Splice {
  from: number;
  removed: string;
  inserted: string;
}

interface Step {
  group: string | null;
  time: number;
  splices: Splice[];
}

/** Changes of one group that follow each other within this time are one step of the undo. */
const SAME_STEP_MS = 1200;

export class SheetText {
  #text: string;
  #lines: string[] | null = null;
  #done: Step[] = [];
  #undone: Step[] = [];
  #listeners: (() => void)[] = [];

  constructor(text: string) {
    this.#text = text;
  }

  get text(): string {
    return this.#text;
  }

  /** The lines, without the empty one behind the last line end. */
  get lines(): readonly string[] {
    this.#lines ??= linesOf(this.#text);
    return this.#lines;
  }

  /** Calls `listener` after each change. */
  onChange(listener: () => void): void {
    this.#listeners.push(listener);
  }

  /** A new sheet: nothing before it can be undone. */
  reset(text: string): void {
    this.#done = [];
    this.#undone = [];
    this.#set(text);
  }

  /** Puts `text` in place of everything. Changes of the same `group` in quick succession are one step. */
  replaceAll(text: string, group: string | null = null): void {
    const splice = difference(this.#text, text);
    if (!splice) return;
    const last = this.#done.at(-1);
    const now = performance.now();
    this.#undone = [];
    if (last && group !== null && last.group === group && now - last.time < SAME_STEP_MS) {
      last.splices.push(splice);
      last.time = now;
    } else {
      this.#done.push({ group, time: now, splices: [splice] });
    }
    this.#set(text);
  }

  /** Puts `lines` in place of `count` lines from `line` (counted from 1). */
  replaceLines(line: number, count: number, lines: readonly string[], group: string | null = null): void {
    const all = [...this.lines];
    all.splice(line - 1, count, ...lines);
    this.replaceAll(all.length ? all.join("\n") + "\n" : "", group);
  }

  /** Carries out the edits of a fix as one step. Where the text has changed meanwhile, they may miss their mark. */
  apply(edits: readonly Edit[]): void {
    const places = edits.map((edit) => {
      const from = offsetOf(this.#text, edit.line, edit.column);
      return { from, to: advance(this.#text, from, edit.length), text: edit.text };
    });
    places.sort((a, b) => b.from - a.from);
    let text = this.#text;
    for (const { from, to, text: inserted } of places) text = text.slice(0, from) + inserted + text.slice(to);
    this.replaceAll(text);
  }

  /** How many steps could be undone now; `undoTo` goes back to it. */
  mark(): number {
    return this.#done.length;
  }

  /** Starts a new step, whatever the next change's group. */
  closeStep(): void {
    const last = this.#done.at(-1);
    if (last) last.group = null;
  }

  /** Undoes every step since `mark`. */
  undoTo(mark: number): void {
    while (this.#done.length > mark) this.undo();
  }

  /** Takes the last step back. Gives the line where it was, or null where there was none. */
  undo(): number | null {
    const step = this.#done.pop();
    if (!step) return null;
    this.#undone.push(step);
    let text = this.#text;
    for (const { from, removed, inserted } of [...step.splices].reverse()) {
      text = text.slice(0, from) + removed + text.slice(from + inserted.length);
    }
    this.#set(text);
    return this.#lineOf(step.splices[0]?.from ?? 0);
  }

  /** Does the last undone step again. Gives the line where it is, or null where there was none. */
  redo(): number | null {
    const step = this.#undone.pop();
    if (!step) return null;
    this.#done.push(step);
    let text = this.#text;
    for (const { from, removed, inserted } of step.splices) {
      text = text.slice(0, from) + inserted + text.slice(from + removed.length);
    }
    this.#set(text);
    return this.#lineOf(step.splices.at(-1)?.from ?? 0);
  }

  #lineOf(offset: number): number {
    return this.#text.slice(0, offset).split("\n").length;
  }

  #set(text: string): void {
    this.#text = text;
    this.#lines = null;
    for (const listener of this.#listeners) listener();
  }
}

/** The lines of `text`, without the empty one behind the last line end. */
export function linesOf(text: string): string[] {
  const lines = text.split("\n");
  if (lines.at(-1) === "") lines.pop();
  return lines;
}

/** Line ends as the sheet keeps them, and no byte order mark. */
export function normalised(text: string): string {
  return text.replace(/^\uFEFF/, "").replace(/\r\n?/g, "\n");
}

/** The offset of a place that is counted from 1, its column in Unicode characters. */
export function offsetOf(text: string, line: number, column: number): number {
  let start = 0;
  for (let passed = 1; passed < line; passed++) {
    const end = text.indexOf("\n", start);
    if (end < 0) return text.length;
    start = end + 1;
  }
  return advance(text, start, column - 1);
}

/** The offset that lies `characters` Unicode characters behind `offset`. */
export function advance(text: string, offset: number, characters: number): number {
  let at = offset;
  for (let passed = 0; passed < characters && at < text.length; passed++) {
    at += (text.codePointAt(at) ?? 0) > 0xffff ? 2 : 1;
  }
  return at;
}

/** The smallest single splice that leads from `old` to `next`; null where they are the same. */
export function difference(old: string, next: string): Splice | null {
  if (old === next) return null;
  const most = Math.min(old.length, next.length);
  let from = 0;
  while (from < most && old[from] === next[from]) from++;
  let tail = 0;
  while (tail < most - from && old[old.length - 1 - tail] === next[next.length - 1 - tail]) tail++;
  return { from, removed: old.slice(from, old.length - tail), inserted: next.slice(from, next.length - tail) };
}
