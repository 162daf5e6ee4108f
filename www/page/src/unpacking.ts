/** The packed parts of the file: unpacked when they are needed, or when nothing else is to be done. */

type Later = typeof import("./later.js");

/** The text of the packed part `id`. */
export async function unpack(id: string): Promise<string> {
  const packed = Uint8Array.from(atob(document.getElementById(id)?.textContent ?? ""), (byte) => byte.charCodeAt(0));
  const gunzip = new DecompressionStream("gzip");
  const writer = gunzip.writable.getWriter();
  void writer.write(packed);
  void writer.close();
  return new Response(gunzip.readable).text();
}

let source: Promise<string> | null = null;
let unpacked: string | null = null;

/** Unpacks the later part of the page, without running it yet. */
export function prepareLater(): Promise<string> {
  source ??= unpack("later").then((text) => (unpacked = text));
  return source;
}

/** The later part of the page; null while it is not unpacked. */
export function laterNow(): Later | null {
  if (window.pitchwrightLater === undefined && unpacked !== null) run(unpacked);
  return window.pitchwrightLater ?? null;
}

/** The later part of the page. */
export async function later(): Promise<Later> {
  if (!window.pitchwrightLater) run(await prepareLater());
  if (!window.pitchwrightLater) throw new Error("the file is not whole");
  return window.pitchwrightLater;
}

/** The content policy knows this text by its hash, and no other. */
function run(text: string): void {
  const script = document.createElement("script");
  script.textContent = text;
  document.head.append(script);
  script.remove();
}
