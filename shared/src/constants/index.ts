export { CONSTANTS, CONSTANTS_VERSION, constantById, type Constant } from './constants';
