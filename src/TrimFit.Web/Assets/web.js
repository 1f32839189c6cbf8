// Small helps; every page works without them.
"use strict";

// Files dropped anywhere on the form; too large ones are said at once instead of being sent.
for (const form of document.querySelectorAll("form[data-drop]")) {
  const input = form.querySelector("input[type=file]");
  const tooLarge = () => {
    const bytes = [...input.files].reduce((sum, file) => sum + file.size, 0);
    input.setCustomValidity(bytes > Number(form.dataset.most) ? form.dataset.tooLarge : "");
    return !input.checkValidity();
  };
  input.addEventListener("change", () => { if (tooLarge()) input.reportValidity(); });
  for (const name of ["dragenter", "dragover"])
    form.addEventListener(name, event => { event.preventDefault(); form.classList.add("over"); });
  form.addEventListener("dragleave", () => form.classList.remove("over"));
  form.addEventListener("drop", event => {
    event.preventDefault();
    form.classList.remove("over");
    if (event.dataTransfer.files.length === 0) return;
    input.files = event.dataTransfer.files;
    if (tooLarge()) input.reportValidity(); else form.requestSubmit();
  });
}

// While a form is worked on, the page stays and says how far it is.
for (const form of document.querySelectorAll("form[data-busy]")) {
  form.addEventListener("submit", () => {
    const text = form.querySelector("p.busy"), bar = form.querySelector("progress");
    text.textContent = form.dataset.busy;
    text.hidden = bar.hidden = false;
    for (const button of form.querySelectorAll("button")) setTimeout(() => { button.disabled = true; });
    const ask = async () => {
      try {
        const state = await (await fetch("/progress")).json();
        if (state.text) text.textContent = state.text;
        if (state.share === null || !state.text) bar.removeAttribute("value"); else bar.value = state.share;
      } catch { /* the answer is on its way */ }
      setTimeout(ask, 250);
    };
    setTimeout(ask, 150);
  });
}
// Back from the next page: the form can be used again.
addEventListener("pageshow", event => { if (event.persisted) location.reload(); });

// The slider picks a row of the table; the numbers are the table's own.
for (const box of document.querySelectorAll("[data-slider]")) {
  const rows = [...document.querySelectorAll("#" + box.dataset.slider + " tbody tr")];
  const range = box.querySelector("input"), now = box.querySelector("output");
  const chosen = document.querySelector("[data-chosen=" + box.dataset.slider + "]"), values = [...chosen.querySelectorAll("dd")];
  const show = () => {
    rows.forEach((row, i) => row.classList.toggle("chosen", i === range.valueAsNumber));
    const cells = rows[range.valueAsNumber].cells;
    now.textContent = cells[0].textContent;
    range.setAttribute("aria-valuetext", cells[0].textContent);
    values.forEach((value, i) => { value.textContent = cells[i].textContent; });
  };
  range.addEventListener("input", show);
  box.hidden = chosen.hidden = false;
  show();
}

// The rig form: what is typed is judged and drawn by the program.
for (const form of document.querySelectorAll("form[data-check]")) {
  const drawing = document.getElementById("drawing"), other = document.getElementById("other-faults");
  let timer, touched = new Set(), round = 0;
  const check = async () => {
    const mine = ++round;
    const answer = await fetch(form.dataset.check, { method: "POST", body: new URLSearchParams(new FormData(form)) });
    if (!answer.ok || mine !== round) return;
    const state = await answer.json();
    const faults = new Map(state.faults.map(fault => [fault.field, fault.message]));
    for (const field of form.querySelectorAll("[data-field]")) {
      const fault = touched.has(field.dataset.field) ? faults.get(field.dataset.field) : undefined;
      field.classList.toggle("wrong", fault !== undefined);
      field.querySelector(".fault").textContent = fault ?? "";
    }
    other.replaceChildren(...state.other.map(message => { const p = document.createElement("p"); p.className = "fault"; p.textContent = message; return p; }));
    if (state.drawing) {
      const svg = new DOMParser().parseFromString(state.drawing, "text/html").querySelector("svg");
      if (svg) drawing.replaceChildren(document.adoptNode(svg));
    }
  };
  const later = event => {
    if (event.target.name) touched.add(event.target.name);
    clearTimeout(timer);
    timer = setTimeout(check, 300);
  };
  form.addEventListener("input", later);
  form.addEventListener("change", later);
}
