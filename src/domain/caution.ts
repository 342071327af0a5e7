/** Stands in every output that leaves the program. */
export const CAUTION =
  'An aid to the engineer, not a design: axial forces of an idealised pin-jointed truss. Connections, local effects, ' +
  'bending between nodes, fatigue, fire, seismic detailing and erection stages are not checked, and bracing is not ' +
  'loaded for imperfections. Local codes and the judgement of a licensed engineer decide.';

/** The same where the whole was made to lean: what bracing has to keep straight is still not loaded. */
export const CAUTION_WITH_SWAY = CAUTION.replace(
  'bracing is not loaded for imperfections',
  'bracing is loaded for the sway of the whole, not for the bow of what it keeps straight',
);
