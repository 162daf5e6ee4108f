/** The engine's JSON as objects. Objects whose keys are names out of a sheet lose their prototype. */
import type { Result, Trail } from "./types.js";

/** Keys under which the engine writes conditions, alone or in lists. */
const CONDITIONS = new Set(["condition", "first", "worst", "conditions"]);

/** The result that `json` holds. */
export function resultOf(json: string): Result {
  const result = JSON.parse(json) as Result;
  for (const part of [result.quantities, result.governing, result.requirements, result.freebodies, result.figures, result.findings]) {
    strip(part);
  }
  return result;
}

/** The trail that `json` holds. */
export function trailOf(json: string): Trail {
  const trail = JSON.parse(json) as Trail;
  strip(trail.steps);
  return trail;
}

function strip(part: unknown): void {
  if (Array.isArray(part)) {
    // Lists of values are long and hold no objects.
    if (typeof part[0] === "object") part.forEach(strip);
  } else if (typeof part === "object" && part !== null) {
    for (const [key, value] of Object.entries(part)) {
      if (CONDITIONS.has(key)) stripConditions(value);
      strip(value);
    }
  }
}

/** `worst` of a requirement and `conditions` of a finding hold more than labels, and stay what they are. */
function stripConditions(value: unknown): void {
  if (Array.isArray(value)) value.forEach(stripConditions);
  else if (typeof value === "object" && value !== null && Object.values(value).every((label) => typeof label === "string")) {
    Object.setPrototypeOf(value, null);
  }
}
