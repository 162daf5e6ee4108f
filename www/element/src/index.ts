/** The package's entry. */
import "./browser.js";

export * from "./names.js";
