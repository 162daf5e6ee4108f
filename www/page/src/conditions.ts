/** Which conditions the form shows: one axis across, the others each at a label or all where one quantity governs. */
import { digitsOf, labelAt, type Axis, type Condition, type Extreme, type Finding, type Governing, type Quantity, type Report } from "./report.js";

/** What the person chose; what is left open is chosen by `shownBy`. */
export interface Choice {
  /** The axis that runs across. */
  across?: string;
  /** The quantity whose governing condition is shown; null for labels set one by one. */
  governedBy?: string | null;
  /** Labels set one by one. */
  at: Condition;
}

/** The conditions shown, settled for one report. */
export interface Shown {
  report: Report;
  digits: number;
  across: Axis | null;
  governedBy: string | null;
  /** A label for each axis; the across axis has the governing one here, if it has one. */
  at: Condition;
  /** The report's quantities by their symbols. */
  quantities: ReadonlyMap<string, Quantity>;
  /** The report's findings by their lines. */
  findings: ReadonlyMap<number, NumberedFinding[]>;
}

/** A finding with its number in the whole list. */
export interface NumberedFinding {
  number: number;
  finding: Finding;
}

/** More labels than this make an axis too wide to run across unasked. */
const WIDEST_UNASKED = 24;

/** Settles `choice` for `report`. */
export function shownBy(report: Report, choice: Choice): Shown {
  const governedBy = governingSymbol(report, choice);
  const governing = report.governing.find(({ symbol }) => symbol === governedBy);
  const condition = (governing && governs(governing)?.condition) ?? {};
  const at: Condition = Object.create(null) as Condition;
  for (const { name, labels } of report.axes) {
    const label = labelAt(condition, name) ?? labelAt(choice.at, name);
    at[name] = label !== undefined && labels.includes(label) ? label : (labels[0] ?? "");
  }
  const quantities = new Map(report.quantities.map((quantity) => [quantity.symbol, quantity]));
  const findings = byLine(report.findings);
  return { report, digits: digitsOf(report), across: acrossAxis(report, choice), governedBy, at, quantities, findings };
}

/** The findings of `lines` lines from `line`. */
export function findingsAt(shown: Shown, line: number, lines: number): NumberedFinding[] {
  if (shown.findings.size === 0) return [];
  return Array.from({ length: lines }, (_, index) => shown.findings.get(line + index) ?? []).flat();
}

function byLine(findings: readonly Finding[]): Map<number, NumberedFinding[]> {
  const lines = new Map<number, NumberedFinding[]>();
  findings.forEach((finding, index) => {
    const entry = { number: index + 1, finding };
    const others = lines.get(finding.line);
    if (others) others.push(entry);
    else lines.set(finding.line, [entry]);
  });
  return lines;
}

/** The extreme of larger magnitude, which is the one that governs. */
export function governs(of: Pick<Governing, "largest" | "smallest">): Extreme | null {
  const { largest, smallest } = of;
  if (!largest || !smallest) return largest ?? smallest;
  return Math.abs(smallest.value) > Math.abs(largest.value) ? smallest : largest;
}

/** A condition in words: its labels, in the order of the axes. */
export function conditionText(report: Report, condition: Condition): string {
  const labels = report.axes.flatMap(({ name }) => labelAt(condition, name) ?? []);
  return labels.join(", ");
}

function governingSymbol(report: Report, choice: Choice): string | null {
  if (choice.governedBy === null) return null;
  const asked = report.governing.find(({ symbol }) => symbol === choice.governedBy);
  return (asked ?? report.governing[0])?.symbol ?? null;
}

function acrossAxis(report: Report, choice: Choice): Axis | null {
  const used = usedAxes(report);
  const asked = used.find(({ name }) => name === choice.across);
  if (asked) return asked;
  const first = report.governing[0];
  const over = first ? report.quantities.find(({ symbol }) => symbol === first.symbol)?.axes : undefined;
  const narrow = used.filter(({ labels }) => labels.length <= WIDEST_UNASKED);
  return narrow.find(({ name }) => over?.includes(name)) ?? narrow[0] ?? null;
}

/** The axes that something varies over. */
export function usedAxes(report: Report): Axis[] {
  const names = new Set(report.quantities.flatMap(({ axes }) => axes));
  return report.axes.filter(({ name, labels }) => names.has(name) && labels.length > 0);
}
