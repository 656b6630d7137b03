import { signal } from '@preact/signals';

/** Two panes: a tablet, or a phone on its side. */
const query = matchMedia('(min-width: 840px), (orientation: landscape) and (min-width: 700px)');
export const wide = signal(query.matches);
query.addEventListener('change', () => { wide.value = query.matches; });

/** Some browsers let a page write to the clipboard but not read it; then there is only the system's paste. */
export const canReadClipboard = Boolean(/** @type {Partial<Navigator>} */ (navigator).clipboard?.readText);
