/** The thread of a sheet: bundled as one script without imports, it runs in a browser's worker and in Node's. */
import * as glue from "../../page/generated/engine.js";
import type { FromThread, State, ToThread } from "./calls.js";
import { SheetError, errorOf } from "./errors.js";
import { Sheet } from "./sheet.js";

/** The calls after which the sheet may be another. */
const CHANGES = new Set(["set", "update", "fix"]);

let sheet: Sheet | null = null;

self.onmessage = (event: MessageEvent<ToThread>) => {
  const message = event.data;
  if ("module" in message) glue.initSync({ module: message.module });
  else self.postMessage(answer(message));
};

function answer(message: Exclude<ToThread, { module: WebAssembly.Module }>): FromThread {
  const { id } = message;
  try {
    if ("open" in message) {
      const { text, sheets, operations } = message.open;
      sheet = new Sheet(glue, new glue.OpenSheet(text, sheets, operations));
      return { id, value: null, state: state(sheet) };
    }
    if (!sheet) throw new Error("no sheet is open");
    const method = sheet[message.call as keyof Sheet] as (...given: readonly unknown[]) => unknown;
    const value = method.apply(sheet, [...message.given]);
    return { id, value, state: CHANGES.has(message.call) ? state(sheet) : null };
  } catch (thrown) {
    const error = errorOf(thrown, () => glue.last_panic());
    return { id, finding: (error instanceof SheetError ? error : (errorOf(String(error), () => undefined) as SheetError)).finding };
  }
}

function state(of: Sheet): State {
  return { json: of.json(), text: of.text, digits: of.digits };
}
