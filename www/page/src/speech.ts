/** What is spoken of a row once it is taken: its value and its findings. */
import { conditionText, findingsAt, governs, type Shown } from "./conditions.js";
import { nameOf, quantitiesOf } from "./rows.js";
import { words } from "./strings.js";
import { count } from "./numbers.js";
import { extremeText, valueCells } from "./values.js";
import type { FormRow, Quantity } from "./report.js";

/** The row in words. */
export function spoken(row: FormRow, shown: Shown): string {
  const values = quantitiesOf(row, shown).map((quantity) => valueInWords(quantity, shown));
  const found = findingsAt(shown, row.line, row.lines);
  const queries = found.map(({ number, finding }) => `${words.finding(number)}, ${words.severity[finding.severity]}: ${finding.message}`);
  return [nameOf(row), ...values, ...(queries.length > 0 ? queries : [words.noFindings])].join(". ");
}

function valueInWords(quantity: Quantity, shown: Shown): string {
  if (quantity.axes.length === 0) {
    const text = valueCells(quantity, shown)[0]?.text ?? words.noValue;
    return `${quantity.symbol} ${text} ${quantity.unit ?? ""}`.trim();
  }
  const extreme = governs(quantity);
  const counted = words.conditions(count(quantity.conditions));
  if (!extreme) return `${quantity.symbol}, ${counted}`;
  const where = conditionText(shown.report, extreme.condition);
  return `${quantity.symbol}, ${counted}, ${words.governs} ${extremeText({ ...extreme, condition: {} }, quantity.unit, shown)}, ${where}`;
}
