/** What is unpacked after the first values stands ready here for the rest of the page. */
import * as later from "./later.js";

window.pitchwrightLater = later;
