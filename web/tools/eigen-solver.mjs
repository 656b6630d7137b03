// Of ml-matrix the eigen-solver alone; the package names, and types, only its whole.
// @ts-ignore
export { default as Matrix } from '../node_modules/ml-matrix/src/matrix.js';
// @ts-ignore
export { default as EigenvalueDecomposition } from '../node_modules/ml-matrix/src/dc/evd.js';
