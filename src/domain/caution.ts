/** Stands in every output that leaves the program. */
export const CAUTION =
  'An aid to the engineer, not a design: axial forces of an idealised pin-jointed truss. Connections, local effects, ' +
  'bending between nodes, fatigue, fire, seismic detailing and erection stages are not checked, and bracing is not ' +
  'loaded for imperfections. Local codes and the judgement of a licensed engineer decide.';
