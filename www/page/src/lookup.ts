/** What is looked up beside the form: trails and the catalogue, on one slip. */
import type { Catalogue } from "./answers.js";
import type { Asked } from "./asking.js";
import { CatalogueSlip } from "./catalogue.js";
import { ReportsSlip, type ReportServices } from "./reports.js";
import { Slip } from "./slip.js";
import { TrailSlip, type TrailServices } from "./trail.js";

export interface LookupServices extends TrailServices, ReportServices {
  /** Puts text into the row being typed. */
  insert(text: string): void;
  /** The slip was put away; the keyboard goes back to the form. */
  closed(): void;
}

export class Lookup {
  #slip: Slip;
  #trail: TrailSlip;
  #catalogue: CatalogueSlip;
  #reports: ReportsSlip;
  #read: Promise<Catalogue> | null = null;

  constructor(services: LookupServices) {
    this.#slip = new Slip(() => services.closed());
    this.#trail = new TrailSlip(this.#slip, services);
    this.#reports = new ReportsSlip(this.#slip, services);
    const read = () => (this.#read ??= services.engine.ask({ kind: "catalogue" }));
    this.#catalogue = new CatalogueSlip(this.#slip, read, (text) => services.insert(text));
  }

  /** How a value came about. */
  trail(asked: Asked): void {
    void this.#trail.show(asked);
  }

  /** The catalogue, to be searched. */
  catalogue(): void {
    void this.#catalogue.show().catch(() => (this.#read = null));
  }

  /** The sheets kept in this browser. */
  reports(): void {
    this.#reports.show();
  }

  /** The values have changed. */
  refresh(): void {
    void this.#trail.refresh();
  }

  /** Puts the slip away. */
  close(): void {
    this.#slip.close();
  }
}
