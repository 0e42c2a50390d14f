"use strict";
// Comfort over a form that works without this: several files become rows at once, two are read at
// a time, and the address keeps what was read.
const form = document.getElementById("intake");
const input = document.getElementById("file");
const drop = document.getElementById("drop");
const button = form.querySelector("button");
const state = document.getElementById("state");
const results = document.getElementById("results");
const list = document.getElementById("rows");
const ids = [];

form.querySelector(".can-drop").hidden = false;

for (const name of ["dragenter", "dragover"]) {
  drop.addEventListener(name, (event) => {
    event.preventDefault();
    drop.classList.add("over");
  });
}
for (const name of ["dragleave", "drop"]) {
  drop.addEventListener(name, () => drop.classList.remove("over"));
}
drop.addEventListener("drop", (event) => {
  event.preventDefault();
  if (event.dataTransfer.files.length === 0) return;
  input.files = event.dataTransfer.files;
  form.requestSubmit();
});

form.addEventListener("submit", (event) => {
  if (busy()) {
    event.preventDefault();
    return;
  }
  const files = [...input.files];
  const text = form.elements.text.value.trim();
  if (files.length === 0 && text === "") {
    event.preventDefault();
    state.textContent = "Choose a file, or paste the text of a sheet.";
    input.focus();
    return;
  }
  if (files.length > Number(form.dataset.most)) {
    event.preventDefault();
    state.textContent = `At most ${form.dataset.most} files are taken at once; ${files.length} were chosen.`;
    return;
  }
  setBusy("Reading and judging.");
  if (files.length + (text === "" ? 0 : 1) === 1) return; // the form ends on the report by itself
  event.preventDefault();
  const sheets = text === "" ? files : [...files, new File([text], "pasted-text.txt")];
  checkAll(sheets);
});

// A page that comes back from the browser's memory must not come back busy.
window.addEventListener("pageshow", setFree);

function busy() {
  return button.getAttribute("aria-disabled") === "true";
}

function setBusy(words) {
  button.setAttribute("aria-disabled", "true");
  state.textContent = words;
}

function setFree() {
  button.removeAttribute("aria-disabled");
  state.textContent = "";
}

async function checkAll(sheets) {
  results.hidden = false;
  const waiting = sheets.map((sheet) => [sheet, addRow(sheet.name)]);
  let done = 0;
  const work = async () => {
    for (let next = waiting.shift(); next; next = waiting.shift()) {
      await checkOne(...next);
      done += 1;
      state.textContent = `${done} of ${sheets.length} done.`;
    }
  };
  await Promise.all([work(), work()]);
  button.removeAttribute("aria-disabled");
  state.textContent = `All ${sheets.length} done.`;
  form.reset();
}

function addRow(name) {
  const row = document.createElement("li");
  row.className = "row";
  row.setAttribute("aria-busy", "true");
  const shown = document.createElement("span");
  shown.className = "name printed";
  shown.textContent = name;
  const outcome = document.createElement("span");
  outcome.className = "outcome";
  outcome.textContent = "Waiting.";
  row.append(shown, outcome);
  list.append(row);
  return row;
}

async function checkOne(sheet, row) {
  const outcome = row.querySelector(".outcome");
  outcome.textContent = "Reading and judging.";
  const body = new FormData();
  body.append("file", sheet, sheet.name);
  try {
    const answer = await fetch(form.dataset.rows, { method: "POST", body, headers: { Accept: "text/html" } });
    const page = new DOMParser().parseFromString(await answer.text(), "text/html");
    const made = page.querySelector("li.row");
    if (made === null) {
      const words = page.querySelector(".lead");
      throw new Error(words === null ? `The service answered ${answer.status}.` : words.textContent);
    }
    row.replaceWith(made);
    const link = made.querySelector(".open");
    if (link !== null) remember(link.getAttribute("href").split("/").pop());
  } catch (error) {
    row.removeAttribute("aria-busy");
    outcome.textContent = `Not read. ${error.message} Send it again.`;
  }
}

function remember(id) {
  ids.push(id);
  const query = new URLSearchParams(ids.map((one) => ["id", one]));
  history.replaceState(null, "", `${form.dataset.results}?${query}`);
}
