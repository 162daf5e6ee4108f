/** Opening and saving sheets as files. */
import { el } from "./dom.js";
import { normalised } from "./sheet-text.js";

const ENDING = ".pitchwright";
const LONGEST_BYTES = 1_048_576;

/** A sheet read from a file, or why it was not. */
export type Opened = { name: string; text: string } | { name: string; refused: "not text" | "too long" };

interface Writable {
  write(text: string): Promise<void>;
  close(): Promise<void>;
}

interface FileHandle {
  name: string;
  createWritable(): Promise<Writable>;
}

interface Picker {
  showSaveFilePicker?: (options: object) => Promise<FileHandle>;
}

/** Reads a file as a sheet. */
export async function read(file: File): Promise<Opened> {
  if (file.size > LONGEST_BYTES) return { name: file.name, refused: "too long" };
  try {
    const text = new TextDecoder("utf-8", { fatal: true }).decode(await file.arrayBuffer());
    return { name: file.name, text: normalised(text) };
  } catch {
    return { name: file.name, refused: "not text" };
  }
}

/** The hidden field that the browser's own file dialog belongs to. */
export function fileField(chosen: (file: File) => void): HTMLInputElement {
  const field = el("input", { type: "file", accept: `${ENDING},.txt,text/plain`, hidden: true, tabindex: -1, "aria-hidden": "true" });
  field.addEventListener("change", () => {
    const file = field.files?.[0];
    if (file) chosen(file);
    field.value = "";
  });
  return field;
}

/** Lets a file be dropped anywhere on the page. */
export function acceptDrops(dropped: (file: File) => void): void {
  const hasFiles = (event: DragEvent) => event.dataTransfer?.types.includes("Files") ?? false;
  document.addEventListener("dragover", (event) => {
    if (hasFiles(event)) event.preventDefault();
  });
  document.addEventListener("drop", (event) => {
    const file = event.dataTransfer?.files[0];
    if (!file) return;
    event.preventDefault();
    dropped(file);
  });
}

/** Saves `text`, by the browser's dialog where it has one, else as a download. Gives the name; null when called off. */
export async function save(text: string, suggested: string): Promise<string | null> {
  const pick = (window as Picker).showSaveFilePicker;
  if (!pick) return download(text, suggested);
  try {
    const handle = await pick.call(window, { suggestedName: suggested, types: [{ description: "Pitchwright sheet", accept: { "text/plain": [ENDING] } }] });
    const writable = await handle.createWritable();
    await writable.write(text);
    await writable.close();
    return handle.name;
  } catch (error) {
    if (error instanceof DOMException && error.name === "AbortError") return null;
    return download(text, suggested);
  }
}

function download(text: string, name: string): string {
  const address = URL.createObjectURL(new Blob([text], { type: "text/plain" }));
  el("a", { href: address, download: name }).click();
  window.setTimeout(() => URL.revokeObjectURL(address), 10_000);
  return name;
}

/** A file name from a sheet's title. */
export function nameFor(title: string): string {
  const plain = title.normalize("NFKD").replace(/[^\p{L}\p{N}]+/gu, "-").replace(/^-+|-+$/g, "").toLowerCase();
  return `${plain.slice(0, 60) || "sheet"}${ENDING}`;
}
