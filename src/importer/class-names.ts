/** Classes as the standard writes them; files have them in capitals. */
const WRITTEN = [
  'IfcBeam',
  'IfcBeamStandardCase',
  'IfcColumn',
  'IfcColumnStandardCase',
  'IfcMember',
  'IfcMemberStandardCase',
  'IfcBuilding',
  'IfcBuildingElementPart',
  'IfcBuildingElementProxy',
  'IfcBuildingStorey',
  'IfcBuiltElement',
  'IfcCurtainWall',
  'IfcDiscreteAccessory',
  'IfcDoor',
  'IfcElementAssembly',
  'IfcFastener',
  'IfcFooting',
  'IfcFurnishingElement',
  'IfcMechanicalFastener',
  'IfcPile',
  'IfcPipeSegment',
  'IfcPlate',
  'IfcRailing',
  'IfcRamp',
  'IfcRampFlight',
  'IfcReinforcingBar',
  'IfcRoof',
  'IfcSite',
  'IfcSlab',
  'IfcSpace',
  'IfcStair',
  'IfcStairFlight',
  'IfcStructuralCurveMember',
  'IfcStructuralCurveMemberVarying',
  'IfcTendon',
  'IfcWall',
  'IfcWallStandardCase',
  'IfcWindow',
] as const;

const BY_KEYWORD = new Map(WRITTEN.map((name) => [name.toUpperCase(), name as string]));

/** 'IfcBeam' of 'IFCBEAM'; a class that is not in the list keeps its first letter only. */
export const writtenClass = (keyword: string): string =>
  BY_KEYWORD.get(keyword) ?? `Ifc${keyword.slice(3, 4)}${keyword.slice(4).toLowerCase()}`;
