export { Matrix as default } from 'ml-matrix';
