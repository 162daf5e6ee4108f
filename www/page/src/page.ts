/** The page: its parts, and how a change of the sheet goes through them. */
import type { Asked } from "./asking.js";
import type { Assistance } from "./assisting.js";
import { shownBy, type Choice, type Shown } from "./conditions.js";
import { el, setText } from "./dom.js";
import { Drawings } from "./drawings.js";
import { Engine } from "./engine.js";
import { acceptDrops, fileField, nameFor, read, save } from "./files.js";
import { Findings } from "./findings.js";
import { Form } from "./form.js";
import { GoverningConditions } from "./governing.js";
import { Selectors } from "./head.js";
import { frame, type Controls } from "./layout.js";
import { Notices } from "./notices.js";
import { preparePrint } from "./print.js";
import { digitsOf, type Drawings as Drawn, type Fix, type Report } from "./report.js";
import { RowDesk, tabbed } from "./row-desk.js";
import type { SensitivitySection } from "./sensitivity.js";
import { SheetText } from "./sheet-text.js";
import { spoken } from "./speech.js";
import { newId, Store, type Draft } from "./store.js";
import { words } from "./strings.js";
import { TitleBlock } from "./title-block.js";
import type { Lookup } from "./lookup.js";
import { later, prepareLater, unpack } from "./unpacking.js";
import type { WholeText } from "./whole-text.js";

/** How a sheet that is begun anew looks. */
const FRESH_SHEET = "";

/** The sheet in the file itself. */
export interface OwnSheet {
  /** A copy that carries a sheet of its own names it here. */
  id?: string;
  name?: string | null;
  text: string;
  /** The starting sheets by name and title. */
  titles: [name: string, title: string][];
}

export class Page {
  #sheet: SheetText;
  #draft: Draft;
  #own: OwnSheet;
  #shelf: Promise<Record<string, string>> | null = null;
  /** The texts of the starting sheets, once they are unpacked. */
  #beside: Record<string, string> | null = null;
  #store: Store;
  #engine: Engine;
  #serial = 0;
  #changedAt = 0;
  #report: Report | null = null;
  #choice: Choice = { at: {} };
  #spokenLine: number | null = null;
  #saved: string;
  #notices = new Notices();
  #controls: Controls;
  #live = el("div", { class: "unseen", role: "status", "aria-live": "polite" });
  #form: Form;
  #desk: RowDesk;
  #titleBlock: TitleBlock;
  #selectors: Selectors;
  #findings: Findings;
  #governing = new GoverningConditions();
  #drawings = new Drawings();
  #whole: WholeText | null = null;
  #lookup: Lookup | null = null;
  #sensitivityPlace = el("div");
  #sensitivity: SensitivitySection | null = null;
  #prepared = false;

  /** Starts with the last draft, or with the sheet in the file where there is none. */
  constructor(packedEngine: string, own: OwnSheet) {
    this.#own = own;
    this.#store = new Store({ trouble: (trouble) => this.#trouble(trouble), otherWindow: () => this.#notices.show("window", words.otherWindow) });
    this.#draft = this.#first();
    this.#saved = this.#draft.text;
    this.#sheet = new SheetText(this.#draft.text);
    this.#engine = new Engine(packedEngine, {
      report: (report, serial) => this.#received(report, serial),
      drawings: (drawings, serial) => this.#drawn(drawings, serial),
      failure: (message, serial) => this.#failed(message, serial),
      busy: (busy) => this.#busy(busy),
    });
    // The first text is worked out while the page is laid out.
    this.#changed();
    this.#titleBlock = new TitleBlock(this.#sheet);
    this.#selectors = new Selectors(this.#choice, (choice) => this.#choose(choice));
    this.#form = new Form({ open: (row, place) => this.#desk.open(row, place), key: (event) => this.#desk.key(event), trail: (asked) => void this.#trail(asked) });
    this.#desk = new RowDesk(this.#form, this.#sheet, {
      taken: (line) => this.#speakNext(line),
      fix: (fix) => this.#fix(fix),
      say: (text) => this.#say(text),
      trail: () => void this.#trail(this.#form.askedNow),
      converted: (said) => this.#notices.show("converted", said, [{ text: words.takeBack, act: () => this.#desk.undo() }]),
      assistance: this.#assistance(),
    });
    this.#findings = new Findings({ fix: (fix) => this.#fix(fix), goTo: (line) => this.#goTo(line) });
    this.#controls = this.#layOut();
    this.#listen();
  }

  #layOut(): Controls {
    const field = fileField((file) => void this.#openFile(file));
    const made = frame({
      newSheet: () => this.#beginFresh(),
      open: () => field.click(),
      save: () => void this.#save(),
      sheetText: () => void this.#switch(),
      catalogue: () => void this.#lookUp().then((lookup) => lookup.catalogue()),
      reports: () => void this.#lookUp().then((lookup) => lookup.reports()),
      print: () => void this.#preview(),
      start: (name) => void this.#start(name),
      stop: () => this.#engine.stop(),
    }, {
      notices: this.#notices.element, titleBlock: this.#titleBlock.element, selectors: this.#selectors.element,
      form: this.#form.table, governing: this.#governing.element, sensitivity: this.#sensitivityPlace, drawings: this.#drawings.element, findings: this.#findings.element,
    }, this.#own.titles);
    document.body.append(made.element, field, this.#live);
    return made;
  }

  /** A copy with a sheet of its own opens with that; any other page with the last draft. */
  #first(): Draft {
    const { id, name, text } = this.#own;
    if (id !== undefined) return this.#store.read(id) ?? { id, name: name ?? null, text };
    return this.#store.last() ?? { id: newId(), name: null, text };
  }

  /** The starting sheets, unpacked when they are asked for. */
  #unpackShelf(): Promise<Record<string, string>> {
    this.#shelf ??= unpack("shelf").then((json) => (this.#beside = JSON.parse(json) as Record<string, string>));
    return this.#shelf;
  }

  async #start(name: string): Promise<void> {
    const text = (await this.#unpackShelf())[name];
    if (text !== undefined) this.#begin({ id: newId(), name: null, text });
  }

  #listen(): void {
    this.#sheet.onChange(() => this.#changed());
    acceptDrops((file) => void this.#openFile(file));
    document.addEventListener("keydown", (event) => this.#key(event));
    for (const kind of ["copy", "cut", "paste"] as const) document.addEventListener(kind, (event) => this.#clipboard(event));
    window.addEventListener("beforeprint", () => {
      if (this.#report) preparePrint(this.#report);
      this.#form.whole(true);
    });
    window.addEventListener("afterprint", () => this.#form.whole(false));
    window.addEventListener("beforeunload", (event) => {
      if (!this.#store.works && this.#sheet.text !== this.#saved) event.preventDefault();
    });
  }

  /** Every change of the text comes through here: it is kept, and worked out. */
  #changed(): void {
    this.#changedAt = performance.now();
    this.#engine.evaluate(++this.#serial, this.#sheet.text, this.#others());
    this.#draft.text = this.#sheet.text;
    this.#store.keep(this.#draft);
    document.documentElement.dataset["asked"] = String(this.#serial);
  }

  /** The sheets that this one may use: kept ones by their file names, before the starting sheets. Null where it uses none. */
  #others(): Record<string, string> | null {
    if (!/^[ \t]*use[ \t]/m.test(this.#sheet.text)) return null;
    if (this.#beside === null) {
      // They are unpacked first; what is worked out without them till then is passed over.
      void this.#unpackShelf().then(() => this.#changed());
      return null;
    }
    return { ...this.#beside, ...this.#store.named(this.#draft.id) };
  }

  #received(report: Report, serial: number): void {
    performance.mark("report");
    this.#notices.clear("engine");
    // A report of an older text would put rows at lines that have moved; the newer one is on its way.
    if (serial !== this.#serial) return;
    this.#report = report;
    this.#draw();
    if (!this.#prepared) this.#prepare();
    performance.clearMeasures("key to values");
    performance.measure("key to values", { start: this.#changedAt });
    document.documentElement.dataset["ready"] = String(serial);
  }

  /** The first values stand: now what is needed next is made ready. */
  #prepare(): void {
    performance.mark("first values");
    this.#prepared = true;
    void prepareLater();
    void this.#engine.module.then(async (module) => {
      const { loadHighlighter, SensitivitySection } = await later();
      loadHighlighter(module);
      this.#sensitivity = new SensitivitySection();
      this.#sensitivityPlace.append(this.#sensitivity.element);
      if (this.#report) this.#sensitivity.show(shownBy(this.#report, this.#choice));
    });
  }

  #drawn(drawings: Drawn, serial: number): void {
    if (serial === this.#serial) this.#drawings.show(drawings);
  }

  #draw(): void {
    if (!this.#report) return;
    const shown = shownBy(this.#report, this.#choice);
    this.#titleBlock.show(shown, this.#sheet.text);
    this.#selectors.show(shown);
    this.#form.show(this.#report.form.rows.filter(({ kind }) => kind !== "title"), shown);
    this.#desk.show(shown);
    this.#governing.show(shown);
    this.#findings.show(this.#report);
    this.#whole?.show(this.#report);
    this.#lookup?.refresh();
    this.#sensitivity?.show(shown);
    this.#speak(shown);
  }

  #choose(choice: Choice): void {
    this.#choice = choice;
    this.#draw();
  }

  #failed(message: string, serial: number): void {
    const text = serial === 0 ? `${words.engineStarts}: ${message}` : words.engineBroke(message);
    this.#notices.show("engine", message === "stopped" ? words.stopped : text);
  }

  #busy(busy: boolean): void {
    this.#controls.busy(busy);
  }

  #trouble(trouble: "refused" | null): void {
    if (trouble) this.#notices.show("store", words.notKept, [{ text: words.save, act: () => void this.#save() }]);
    else this.#notices.clear("store");
  }

  #fix(fix: Fix): void {
    this.#desk.close();
    this.#sheet.apply(fix.edits);
    this.#whole?.follow();
    const line = fix.edits[0]?.line;
    if (line === undefined || this.#whole) return;
    this.#form.choose(this.#form.positionAt(line));
    this.#speakNext(line);
  }

  #goTo(line: number): void {
    if (this.#whole) this.#whole.goTo(line);
    else this.#desk.openLine(line);
  }

  /** What the editors ask of the engine, about the text as it is now. */
  #assistance(): Assistance {
    const at = (line: number, column: number) => ({ text: this.#sheet.text, line, column });
    return {
      complete: (line, column) => this.#engine.ask({ kind: "complete", ...at(line, column) }),
      hover: (line, column) => this.#engine.ask({ kind: "hover", ...at(line, column) }),
      findings: (line) => this.#report?.findings.filter((each) => each.line === line) ?? [],
      fix: (fix) => this.#fix(fix),
    };
  }

  async #lookUp(): Promise<Lookup> {
    const { Lookup } = await later();
    this.#lookup ??= new Lookup({
      engine: this.#engine,
      goTo: (line) => this.#goTo(line),
      insert: (text) => (this.#whole ? this.#whole.type(text) : this.#desk.insert(text)),
      closed: () => this.#form.choose(this.#form.current),
      now: () => this.#draft,
      digits: () => (this.#report ? digitsOf(this.#report) : 4),
      begin: (draft) => this.#begin(draft),
      titles: this.#own.titles,
      say: (text) => this.#say(text),
    });
    return this.#lookup;
  }

  /** The report as it is printed, made by the engine. */
  async #preview(): Promise<void> {
    const [{ preview }, html] = await Promise.all([later(), this.#engine.ask({ kind: "print" })]);
    const nonce = document.querySelector<HTMLStyleElement>("style[nonce]")?.nonce ?? "";
    const name = nameFor(String(this.#report?.sheet["title"] ?? "")).replace(/\.pitchwright$/, ".html");
    preview(html, name, nonce, { closed: () => this.#form.choose(this.#form.current) });
  }

  async #trail(asked: Asked | null): Promise<void> {
    if (asked) (await this.#lookUp()).trail(asked);
  }

  #speakNext(line: number): void {
    this.#spokenLine = line;
    if (this.#report && document.documentElement.dataset["ready"] === String(this.#serial)) this.#speak(shownBy(this.#report, this.#choice));
  }

  #speak(shown: Shown): void {
    const line = this.#spokenLine;
    this.#spokenLine = null;
    const row = line === null ? undefined : shown.report.form.rows.find((each) => line >= each.line && line < each.line + each.lines);
    if (row) this.#say(spoken(row, shown));
  }

  #say(text: string): void {
    setText(this.#live, text);
  }

  /** Another sheet; the one before stays in the store. */
  #begin(draft: Draft): void {
    const before = this.#draft;
    this.#desk.close();
    this.#lookup?.close();
    this.#store.flush();
    this.#draft = draft;
    this.#saved = draft.text;
    this.#choice = { at: {} };
    this.#sheet.reset(draft.text);
    this.#whole?.follow();
    if (before.text.trim() === "" || before.text === draft.text || !this.#store.works) return;
    const name = before.text.match(/^title[ \t]+(.+)$/m)?.[1] ?? before.name ?? words.untitled;
    this.#notices.show("before", words.replaced(name), [{ text: words.backToIt, act: () => this.#back(before) }]);
  }

  #beginFresh(): void {
    this.#begin({ id: newId(), name: null, text: FRESH_SHEET });
    if (this.#whole) this.#whole.goTo(1);
    else this.#desk.openFresh(1);
  }

  #back(before: Draft): void {
    this.#begin(this.#store.read(before.id) ?? before);
  }

  async #openFile(file: File): Promise<void> {
    const opened = await read(file);
    if ("refused" in opened) {
      this.#notices.show("file", (opened.refused === "too long" ? words.tooLong : words.notText)(opened.name));
      return;
    }
    this.#begin({ id: newId(), name: opened.name, text: opened.text });
  }

  async #save(): Promise<void> {
    const text = this.#sheet.text;
    const title = this.#report?.form.rows.find(({ word }) => word === "title")?.how ?? "";
    const name = await save(text, this.#draft.name ?? nameFor(title));
    if (name === null) return;
    this.#saved = text;
    this.#draft.name = name;
    this.#store.keep(this.#draft);
    this.#say(words.saved(name));
  }

  async #switch(): Promise<void> {
    const { WholeText } = await later();
    if (this.#whole) {
      this.#whole.element.remove();
      this.#whole = null;
    } else {
      this.#desk.close();
      this.#whole = new WholeText(this.#sheet, this.#assistance());
      this.#controls.formPlace.before(this.#whole.element);
      if (this.#report) this.#whole.show(this.#report);
    }
    this.#controls.textMode(this.#whole !== null);
  }

  #key(event: KeyboardEvent): void {
    if (event.defaultPrevented) return;
    const act = this.#actionFor(event);
    if (!act) return;
    event.preventDefault();
    act();
  }

  #actionFor(event: KeyboardEvent): (() => void) | null {
    const control = event.ctrlKey || event.metaKey;
    const key = event.key.toLowerCase();
    if (control && key === "s") return () => void this.#save();
    if (this.#typing(event.target)) return null;
    // With Alt, some keyboards give another letter for the same key.
    if (event.altKey && !control) return event.code === "KeyC" ? () => this.#copyValues() : null;
    if (!control) return null;
    if (key === "z") return () => (event.shiftKey ? this.#desk.redo() : this.#desk.undo());
    return key === "y" ? () => this.#desk.redo() : null;
  }

  /** Fields and editors have their own undo and clipboard. */
  #typing(target: EventTarget | null): boolean {
    return target instanceof Element && target.closest(".cm-editor, input, select") !== null;
  }

  #copyValues(): void {
    void navigator.clipboard?.writeText(tabbed(this.#form.chosenRows)).then(() => this.#say(words.valuesCopied), () => {});
  }

  #clipboard(event: ClipboardEvent): void {
    const onRow = event.target instanceof Element && event.target.closest("table.form") !== null;
    const marked = document.getSelection()?.isCollapsed === false;
    if (!onRow || marked || this.#typing(event.target) || !event.clipboardData) return;
    event.preventDefault();
    if (event.type === "paste") {
      this.#desk.paste(event.clipboardData.getData("text/plain"));
      return;
    }
    event.clipboardData.setData("text/plain", this.#desk.copied());
    if (event.type === "cut") this.#desk.remove();
  }
}
