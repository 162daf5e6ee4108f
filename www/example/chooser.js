/** A tail-size chooser of somebody else's page: three sliders drive a sheet, and the page draws its own picture of what follows. */
import { openSheet } from "pitchwright";
import "pitchwright/element";

const sliders = [...document.querySelectorAll("input[type=range]")];
const picture = document.getElementById("picture");
const verdict = document.getElementById("verdict");
const shown = document.getElementById("sheet");

const text = await (await fetch(new URL("tail.pitchwright", import.meta.url))).text();
const sheet = await openSheet(text);

for (const slider of sliders) slider.addEventListener("input", follow);
// The whole sheet is drawn again only when a slider is let go.
for (const slider of sliders) slider.addEventListener("change", () => { shown.inputs = chosen(); });
follow();

function chosen() {
  return Object.fromEntries(sliders.map(({ id, valueAsNumber }) => [id, valueAsNumber]));
}

/** Sets the three inputs, reads what follows and draws it. */
function follow() {
  for (const slider of sliders) {
    sheet.set(slider.id, slider.valueAsNumber);
    slider.nextElementSibling.value = `${slider.value} ${slider.dataset.unit}`;
  }
  const at = (symbol) => sheet.values(symbol)[0];
  draw(at("x_ac"), at("x_t"), at("b_t"), at("c_t"), at("x_np"));
  const [fwd, aft] = sheet.values("margin");
  const [requirement] = sheet.result.requirements;
  const [{ largest, smallest }] = sheet.result.governing;
  const loads = [smallest, largest].map(({ value, condition }) => `${value.toFixed(0)} lb (${condition.cg})`).join(" to ");
  verdict.className = requirement.met ? "good" : "bad";
  verdict.textContent = `Static margin ${aft.toFixed(1)} % aft, ${fwd.toFixed(1)} % forward: ${requirement.met ? "enough" : "not enough"}. `
    + `Tail volume ${at("V_h").toFixed(3)}. Balancing load ${loads}.`;
}

function draw(wing, tail, span, chord, neutral) {
  const box = (x, y, width, height, fill) => `<rect x="${x}" y="${y}" width="${width}" height="${height}" rx="0.2" fill="${fill}"/>`;
  picture.innerHTML = box(wing - 1.15, -6, 4.6, 12, "#9db4c8") + box(0, -0.9, tail + chord, 1.8, "#c9d4de")
    + box(tail - chord / 4, -span / 2, chord, span, "#5d7f9c")
    + `<circle cx="${neutral}" cy="0" r="0.25" fill="#a8281d"><title>neutral point</title></circle>`;
}
