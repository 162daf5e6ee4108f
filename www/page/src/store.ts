/** The draft in the browser's store. Saved files are the truth; the draft brings back what was not saved yet. */

/** A sheet as the store keeps it. */
export interface Draft {
  id: string;
  /** Its file name, where it came from or went to a file. */
  name: string | null;
  text: string;
}

export interface StoreEvents {
  /** The store refused; null where it works again. */
  trouble(trouble: "refused" | null): void;
  /** Another window wrote the same sheet. */
  otherWindow(): void;
}

// All local files share one store in some browsers, so every key carries the program's name and the sheet's.
const PREFIX = "pitchwright:";
const LAST = `${PREFIX}last`;
/** What stands before a sheet's own name in its key. */
export const SHEET_PREFIX = `${PREFIX}sheet:`;
const keyOf = (id: string) => SHEET_PREFIX + id;

/** Longer texts are not written with every key. */
const AT_ONCE_MOST = 100_000;
const LATER_MS = 400;

export class Store {
  #events: StoreEvents;
  #waiting: Draft | null = null;
  #timer = 0;
  #refused = false;
  #current = "";

  constructor(events: StoreEvents) {
    this.#events = events;
    window.addEventListener("pagehide", () => this.flush());
    document.addEventListener("visibilitychange", () => this.flush());
    window.addEventListener("storage", (event) => {
      if (event.key === keyOf(this.#current) && event.newValue !== null) this.#events.otherWindow();
    });
  }

  /** Whether drafts are kept. */
  get works(): boolean {
    return !this.#refused;
  }

  /** The sheet that this window, or else the last one, had open. */
  last(): Draft | null {
    const id = this.#try(() => sessionStorage.getItem(LAST)) ?? this.#try(() => localStorage.getItem(LAST));
    return id ? this.read(id) : null;
  }

  /** The sheet kept as `id`. */
  read(id: string): Draft | null {
    return this.#try(() => keptDraft(id));
  }

  /** The texts of kept sheets by their file names without ending, that of `id` left out. */
  named(id: string): Record<string, string> {
    const texts: Record<string, string> = Object.create(null) as Record<string, string>;
    for (const draft of this.#try(keptDrafts) ?? []) {
      if (draft.name && draft.id !== id) texts[draft.name.replace(/\.pitchwright$/, "")] = draft.text;
    }
    return texts;
  }

  /** Keeps `draft` as this window's sheet. */
  keep(draft: Draft): void {
    this.#current = draft.id;
    this.#waiting = draft;
    window.clearTimeout(this.#timer);
    if (draft.text.length <= AT_ONCE_MOST) this.flush();
    else this.#timer = window.setTimeout(() => this.flush(), LATER_MS);
  }

  /** Writes what still waits to be written. */
  flush(): void {
    const draft = this.#waiting;
    if (!draft) return;
    this.#waiting = null;
    try {
      localStorage.setItem(keyOf(draft.id), JSON.stringify({ name: draft.name, text: draft.text }));
      localStorage.setItem(LAST, draft.id);
      sessionStorage.setItem(LAST, draft.id);
      this.#tell(false);
    } catch {
      this.#tell(true);
    }
  }

  #tell(refused: boolean): void {
    if (refused === this.#refused) return;
    this.#refused = refused;
    this.#events.trouble(refused ? "refused" : null);
  }

  /** A store that is closed to the page throws already when it is read. */
  #try<T>(read: () => T): T | null {
    try {
      return read();
    } catch {
      return null;
    }
  }
}

/** The sheet kept as `id`; null where there is none that can be read. */
function keptDraft(id: string): Draft | null {
  const kept = parsed(localStorage.getItem(keyOf(id))) as Partial<Draft> | null;
  if (typeof kept?.text !== "string") return null;
  return { id, text: kept.text, name: typeof kept.name === "string" ? kept.name : null };
}

/** All kept sheets, in the order of their ids. */
export function keptDrafts(): Draft[] {
  const keys = Object.keys(localStorage).filter((key) => key.startsWith(SHEET_PREFIX)).sort();
  return keys.flatMap((key) => keptDraft(key.slice(SHEET_PREFIX.length)) ?? []);
}

/** What a kept text says as JSON; null where it says nothing. */
export function parsed(text: string | null): unknown {
  try {
    return text === null ? null : JSON.parse(text);
  } catch {
    return null;
  }
}

/** A name for a new sheet in the store. */
export function newId(): string {
  return crypto.randomUUID();
}
