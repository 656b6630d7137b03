// What the app uses of qr.
export { decodeQR } from 'qr/decode.js';
