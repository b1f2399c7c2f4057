import { refused, type Change } from './change';

/** Fewer coil elements see less outlying tissue; which ones can be chosen has to be known. */
export const coilElements: Change = ({ prescription }) =>
  refused('coil-elements-unknown', `The elements of “${prescription.coil}” are not described for this scanner, so none can be left out.`);
