export { EigenvalueDecomposition, Matrix } from 'ml-matrix';
