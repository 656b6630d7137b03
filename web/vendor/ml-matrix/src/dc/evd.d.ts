export { EigenvalueDecomposition as default } from 'ml-matrix';
