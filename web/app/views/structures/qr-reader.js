/** Pixels of the longer side that a picture is read at: the first that shows a code wins. */
const PHOTO_SIDES = [1024, 2048, 512];
const FRAME_SIDE = 800;
/** Milliseconds for second thoughts about one picture. */
const PHOTO_MS = 1500;

/** @typedef {{ detect: (source: ImageBitmapSource) => Promise<{ rawValue: string }[]> }} Detector */
/** @typedef {HTMLVideoElement | ImageBitmap} Picture */

/** The browser's own reader, null where it has none for QR codes. @returns {Promise<Detector | null>} */
async function ownReader() {
  const Own = /** @type {any} */ (globalThis).BarcodeDetector;
  if (!Own) return null;
  const formats = await Own.getSupportedFormats().catch(() => []);
  return formats.includes('qr_code') ? new Own({ formats: ['qr_code'] }) : null;
}

/** @param {Picture} picture */
const sizeOf = (picture) => ('videoWidth' in picture ? { width: picture.videoWidth, height: picture.videoHeight } : { width: picture.width, height: picture.height });

/** The picture drawn small enough. @param {Picture} picture @param {number} side @returns {ImageData | null} */
function pixels(picture, side) {
  const { width, height } = sizeOf(picture);
  const scale = Math.min(1, side / Math.max(width, height));
  const canvas = document.createElement('canvas');
  canvas.width = Math.max(1, Math.round(width * scale));
  canvas.height = Math.max(1, Math.round(height * scale));
  const flat = canvas.getContext('2d', { willReadFrequently: true });
  if (!flat || !width) return null;
  flat.drawImage(picture, 0, 0, canvas.width, canvas.height);
  return flat.getImageData(0, 0, canvas.width, canvas.height);
}

/** What the fetched decoder finds in a picture. @param {Picture} picture @param {number} side @param {{ effort?: number, timeLimit?: number }} [given] */
async function decoded(picture, side, given) {
  const { decodeQR } = await import('qr/decode.js');
  const image = pixels(picture, side);
  try {
    return image ? decodeQR(image, given) : '';
  } catch {
    return ''; // it throws where there is no code
  }
}

/** Reads QR codes: by the browser where it can, else by a decoder that is fetched only then.
 * @returns {Promise<{ frame: (video: HTMLVideoElement) => Promise<string>, photo: (file: Blob) => Promise<string> }>} the text, '' where there is no code */
export async function qrReader() {
  const own = await ownReader();
  const byOwn = async (/** @type {Picture} */ picture) => (own ? (await own.detect(picture).catch(() => []))[0]?.rawValue ?? '' : '');
  return {
    frame: (video) => (own ? byOwn(video) : decoded(video, FRAME_SIDE)),
    photo: async (file) => {
      const picture = await createImageBitmap(file);
      let text = await byOwn(picture);
      for (const side of PHOTO_SIDES) text ||= await decoded(picture, side, { effort: 4, timeLimit: PHOTO_MS });
      picture.close();
      return text;
    },
  };
}
