/** The person's sheets in the browser's store, each with its revisions, and the one file that holds them all. */
import { keptDrafts, parsed, SHEET_PREFIX, type Draft } from "./store.js";

/** A sheet as it stood when its revision was kept. */
export interface Revision {
  /** When it was kept, as the person's clock says. */
  at: string;
  /** The sheet's own `revision` line. */
  revision: string;
  text: string;
}

interface Packed extends Draft {
  revisions: Revision[];
}

const REVISIONS_PREFIX = "pitchwright:revisions:";

/** All kept sheets, by their titles. */
export function sheets(): Draft[] {
  return keptDrafts().sort((a, b) => titleOf(a).localeCompare(titleOf(b), "en") || a.id.localeCompare(b.id, "en"));
}

/** What a sheet is called: its title line, else its file's name. */
export function titleOf({ text, name }: Draft): string {
  return wordOf(text, "title") || name || "";
}

/** What a sheet's line of title block `word` says. */
export function wordOf(text: string, word: string): string {
  return text.match(new RegExp(`^${word}[ \\t]+(.*)$`, "m"))?.[1]?.trim() ?? "";
}

/** The revisions of the sheet `id`, the last one first. */
export function revisionsOf(id: string): Revision[] {
  const kept = parsed(localStorage.getItem(REVISIONS_PREFIX + id));
  return Array.isArray(kept) ? kept.flatMap((each) => revision(each) ?? []) : [];
}

/** Keeps `text` as a revision of the sheet `id`. */
export function keepRevision(id: string, text: string): void {
  const at = new Date().toISOString().slice(0, 16).replace("T", " ");
  const kept = [{ at, revision: wordOf(text, "revision"), text }, ...revisionsOf(id)];
  localStorage.setItem(REVISIONS_PREFIX + id, JSON.stringify(kept));
}

/** Takes the sheet `id` out of the store with its revisions. */
export function remove(id: string): void {
  localStorage.removeItem(SHEET_PREFIX + id);
  localStorage.removeItem(REVISIONS_PREFIX + id);
}

/** All sheets with their revisions as one text. */
export function packed(): string {
  const all: Packed[] = sheets().map((sheet) => ({ ...sheet, revisions: revisionsOf(sheet.id) }));
  return JSON.stringify({ "pitchwright sheets": 1, sheets: all }, null, 1);
}

/** Brings the sheets of such a text into the store, beside those that are there; gives how many, null where it is no such text. */
export function bringIn(text: string, newId: () => string): number | null {
  const file = parsed(text) as { sheets?: unknown } | null;
  if (typeof file !== "object" || file === null || !("pitchwright sheets" in file) || !Array.isArray(file.sheets)) return null;
  const found = (file.sheets as Partial<Packed>[]).filter((each) => typeof each?.text === "string");
  for (const { text: sheet, name, revisions } of found) {
    const id = newId();
    localStorage.setItem(SHEET_PREFIX + id, JSON.stringify({ name: typeof name === "string" ? name : null, text: sheet }));
    const kept = Array.isArray(revisions) ? revisions.flatMap((each) => revision(each) ?? []) : [];
    if (kept.length > 0) localStorage.setItem(REVISIONS_PREFIX + id, JSON.stringify(kept));
  }
  return found.length;
}

function revision(kept: unknown): Revision | null {
  const { at, revision: word, text } = (kept ?? {}) as Partial<Revision>;
  return typeof text === "string" ? { at: String(at ?? ""), revision: String(word ?? ""), text } : null;
}
