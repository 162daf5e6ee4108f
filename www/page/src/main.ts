/** Starts the page. */
import { Page } from "./page.js";

performance.mark("script");
// Nothing here talks to anybody. The policy in the head cannot close this door, so it is taken off its hinges.
Reflect.deleteProperty(window, "RTCPeerConnection");

const data = (id: string) => document.getElementById(id)?.textContent ?? "";
const sheets = JSON.parse(data("sheets")) as Record<string, string>;
new Page(data("engine"), sheets, "osier-balancing-loads");
