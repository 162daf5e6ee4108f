/** Shows the sheet: the one in this file, the last draft, or the first of the starting sheets. */
import { Page, type OwnSheet } from "./page.js";

const data = (id: string) => document.getElementById(id)?.textContent ?? "";
new Page(data("engine"), JSON.parse(data("sheet")) as OwnSheet);
