/** How a class of the file is called in a sentence to a modeller. */
const WORDS: Readonly<Record<string, string>> = {
  IFCFACETEDBREP: 'a boundary representation',
  IFCFACETEDBREPWITHVOIDS: 'a boundary representation',
  IFCADVANCEDBREP: 'a boundary representation with curved faces',
  IFCADVANCEDBREPWITHVOIDS: 'a boundary representation with curved faces',
  IFCTRIANGULATEDFACESET: 'a triangulated mesh',
  IFCTRIANGULATEDIRREGULARNETWORK: 'a triangulated mesh',
  IFCPOLYGONALFACESET: 'a polygonal mesh',
  IFCFACEBASEDSURFACEMODEL: 'a surface model',
  IFCSHELLBASEDSURFACEMODEL: 'a surface model',
  IFCBOUNDINGBOX: 'a bounding box',
  IFCFIXEDREFERENCESWEPTAREASOLID: 'a profile swept along a curve',
  IFCSURFACECURVESWEPTAREASOLID: 'a profile swept along a curve on a surface',
  IFCSECTIONEDSOLIDHORIZONTAL: 'a sectioned solid',
  IFCSECTIONEDSPINE: 'a sectioned spine',
  IFCREVOLVEDAREASOLIDTAPERED: 'a tapered revolved profile',
  IFCCRANERAILASHAPEPROFILEDEF: 'a crane rail',
  IFCCRANERAILFSHAPEPROFILEDEF: 'a crane rail',
  IFCARBITRARYOPENPROFILEDEF: 'an open line',
  IFCPROFILEDEF: 'a mere name',
};

/** `upper` is the upper-case keyword. */
export const inWords = (upper: string): string => WORDS[upper] ?? `of the class ${upper}`;
