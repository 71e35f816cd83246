/**
 * Filters the table of systems on the overview as one types: every word must occur in the row. Runs in the reader's browser;
 * without it the whole table is shown.
 */
export const OVERVIEW_SCRIPT = `"use strict";
(() => {
  const box = document.getElementById("filter");
  const told = document.getElementById("told");
  const groups = Array.from(document.querySelectorAll("tbody.group"), (group) => ({
    group,
    rows: Array.from(group.querySelectorAll("tr.system"), (row) => ({
      row,
      text: (group.rows[0].textContent + " " + row.textContent).toLowerCase(),
    })),
  }));
  const total = groups.reduce((sum, { rows }) => sum + rows.length, 0);
  const apply = () => {
    const words = box.value.toLowerCase().split(/\\s+/).filter((word) => word !== "");
    let shown = 0;
    for (const { group, rows } of groups) {
      let own = 0;
      for (const { row, text } of rows) {
        const fits = words.every((word) => text.includes(word));
        row.hidden = !fits;
        if (fits) own++;
      }
      group.hidden = own === 0;
      shown += own;
    }
    told.textContent = shown + " of " + total + " systems";
  };
  document.getElementById("search").hidden = false;
  box.addEventListener("input", apply);
  apply();
})();
`;
