/** The parts of the page that nobody needs before the first values stand. */
export { loadHighlighter } from "./editing.js";
export { RowEditor } from "./row-editor.js";
export { WholeText } from "./whole-text.js";
export { converted } from "./pasting.js";
export { preview } from "./preview.js";
export { SensitivitySection } from "./sensitivity.js";
export { Lookup } from "./lookup.js";
