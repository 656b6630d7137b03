/** What the trouble with a camera is, and what mends it. @type {Record<string, string>} */
const TROUBLES = {
  NotAllowedError: 'The camera was refused. Allow it for this page in the settings of the browser, or read the code from a photograph.',
  NotFoundError: 'No camera was found on this device. Read the code from a photograph.',
  NotReadableError: 'The camera is in use elsewhere. Close what uses it, then start again.',
  OverconstrainedError: 'No camera of this device suits. Read the code from a photograph.',
};
const WANTED = { audio: false, video: { facingMode: 'environment', width: { ideal: 1280 }, height: { ideal: 960 } } };
const UNSAFE = 'The browser gives no camera to a page without HTTPS. Read the code from a photograph.';

/** In words of the bench. @param {unknown} error */
export const cameraTrouble = (error) => TROUBLES[/** @type {any} */ (error)?.name] ?? `The camera did not start (${error}). Read the code from a photograph.`;

/** Start the camera into a video; the answer stops it. @param {HTMLVideoElement} video @returns {Promise<() => void>} */
export async function startCamera(video) {
  if (!navigator.mediaDevices?.getUserMedia) throw Object.assign(new Error(UNSAFE), { toString: () => UNSAFE });
  const stream = await navigator.mediaDevices.getUserMedia(WANTED);
  const stop = () => {
    stream.getTracks().forEach((track) => track.stop());
    video.srcObject = null;
  };
  video.srcObject = stream;
  try {
    await video.play();
  } catch (error) {
    stop();
    throw error;
  }
  return stop;
}
