import { html } from 'htm/preact';

const PATHS = {
  back: 'M15 4 7 12l8 8',
  menu: 'M4 6h16M4 12h16M4 18h11',
  erase: 'M9 5h11v14H9l-6-7ZM12 9.5l5 5M17 9.5l-5 5',
  left: 'M14 5l-7 7 7 7',
  right: 'M10 5l7 7-7 7',
  check: 'M5 12.5 10 17.5 19 7',
  flag: 'M6 21V4h11l-2.5 4L17 12H6',
  plus: 'M12 5v14M5 12h14',
  minus: 'M5 12h14',
  photo: 'M4 7h4l1.5-2h5L16 7h4v12H4ZM12 16a3.2 3.2 0 1 0 0-6.4A3.2 3.2 0 0 0 12 16Z',
};

/** @param {{ name: keyof typeof PATHS, size?: number }} props */
export function Icon({ name, size = 24 }) {
  return html`<svg class="icon" viewBox="0 0 24 24" width=${size} height=${size} aria-hidden="true">
    <path d=${PATHS[name]} />
  </svg>`;
}
