/** @param {string} text */
export const copyText = (text) => navigator.clipboard.writeText(text);

/** The system's share sheet where there is one, else the clipboard. @param {string} title @param {string} text */
export async function shareText(title, text) {
  if (navigator.share) await navigator.share({ title, text });
  else await copyText(text);
}

/** @param {string} name @param {string} content @param {string} type */
export function download(name, content, type) {
  const url = URL.createObjectURL(new Blob([content], { type }));
  const link = document.createElement('a');
  link.href = url;
  link.download = name.replace(/[^\w .,()-]+/g, '-');
  link.click();
  setTimeout(() => URL.revokeObjectURL(url), 10_000);
}
