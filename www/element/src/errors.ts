/** What is thrown where a question cannot be answered. */
import type { Finding } from "./types.js";

/** A wrong question, told as a finding is: no such symbol, axis or label, or a sheet that was closed. */
export class SheetError extends Error {
  override readonly name: string = "SheetError";
  /** What is wrong. */
  readonly finding: Finding;

  /** @internal */
  constructor(finding: Finding) {
    super(finding.message);
    this.finding = finding;
  }
}

/** A finding that the engine did not make. */
export function finding(code: string, message: string): Finding {
  return { severity: "error", code, line: 1, column: 1, length: 0, column16: 1, length16: 0, message, conditions: null, fixes: [] };
}

/** What the engine threw, as an error with a finding: it throws a finding, a sentence, or breaks off. */
export function errorOf(thrown: unknown, broke: () => string | undefined): Error {
  if (thrown instanceof SheetError || thrown instanceof TypeError) return thrown;
  if (isFinding(thrown)) return new SheetError(thrown);
  if (typeof thrown === "string") return new SheetError(finding("engine-failure", thrown));
  return new SheetError(finding("engine-failure", `The engine broke off: ${broke() ?? String(thrown)}`));
}

function isFinding(thrown: unknown): thrown is Finding {
  return typeof thrown === "object" && thrown !== null && "code" in thrown && "fixes" in thrown;
}
