/** Steps as the engine reads them: "OsO4, NMO", or "1) O3 2) Me2S". @param {string[][]} steps */
export function textOf(steps) {
  const full = steps.filter((step) => step.length);
  return full.length < 2 ? (full[0] ?? []).join(', ') : full.map((step, i) => `${i + 1}) ${step.join(', ')}`).join(' ');
}

/** @param {string} text @returns {string[][]} */
export function stepsOf(text) {
  const parts = text.split(/(?:^|\s)\d\)\s*/).map((part) => part.trim()).filter(Boolean);
  return parts.map((part) => part.split(/[,;]\s+/).map((name) => name.trim()).filter(Boolean));
}

/** Conditions as they are said: "O3, then Me2S". @param {string} text */
export const said = (text) => stepsOf(text).map((step) => step.join(', ')).join(', then ');
