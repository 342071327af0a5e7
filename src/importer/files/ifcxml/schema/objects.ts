import type { SchemaPart } from './parts.ts';

/**
 * Objects that have a GlobalId: products, types, groups, relationships, sets of properties.
 * The notation is told in `parts.ts`.
 */
export const OBJECTS: readonly SchemaPart[] = [
  {
    of: ['IFC2X3', 'IFC4', 'IFC4X3'],
    entities: `
IfcSpatialStructureElement: IfcBuildingStorey | Elevation=r
IfcElement: IfcDistributionElement IfcElementComponent IfcFeatureElement IfcFurnishingElement
IfcDistributionElement: IfcDistributionFlowElement
IfcProduct: IfcElement | Tag=s
IfcElement: IfcElementAssembly | AssemblyPlace=e PredefinedType=e
IfcElementType: IfcElementComponentType
IfcTypeProduct: IfcElementType | ElementType=s
IfcFeatureElement: IfcFeatureElementAddition IfcFeatureElementSubtraction
IfcDistributionFlowElement: IfcFlowSegment
IfcObject: IfcGroup
IfcObjectDefinition: IfcObject | ObjectType=s
IfcRoot: IfcObjectDefinition IfcPropertyDefinition IfcRelationship
IfcPropertySetDefinition: IfcPropertySet | HasProperties=@*
IfcPropertyDefinition: IfcPropertySetDefinition
IfcRelAssigns: IfcRelAssignsToGroup | RelatingGroup=@IfcGroup
IfcRelAssociates: IfcRelAssociatesMaterial | RelatingMaterial=?
IfcRelationship: IfcRelConnects
IfcRelConnects: IfcRelConnectsElements | ConnectionGeometry=@ RelatingElement=@ RelatedElement=@
IfcRelConnectsElements: IfcRelConnectsPathElements | RelatingPriorities=i* RelatedPriorities=i*
  RelatedConnectionType=e RelatingConnectionType=e
IfcRelConnects: IfcRelConnectsStructuralActivity | RelatingElement=? RelatedStructuralActivity=@
IfcRelConnects: IfcRelConnectsStructuralMember | RelatingStructuralMember=@ RelatedStructuralConnection=@
  AppliedCondition=@ AdditionalConditions=@ SupportedLength=r ConditionCoordinateSystem=@IfcAxis2Placement3D
IfcRelConnectsStructuralMember: IfcRelConnectsWithEccentricity | ConnectionConstraint=@
IfcRelConnectsElements: IfcRelConnectsWithRealizingElements | RealizingElements=@* ConnectionType=s
IfcRelConnects: IfcRelContainedInSpatialStructure | RelatedElements=@* RelatingStructure=@
IfcRelConnects: IfcRelCoversBldgElements | RelatingBuildingElement=@ RelatedCoverings=@IfcCovering*
IfcRelConnects: IfcRelFillsElement | RelatingOpeningElement=@IfcOpeningElement RelatedBuildingElement=@
IfcRelConnects: IfcRelServicesBuildings | RelatingSystem=@IfcSystem RelatedBuildings=@*
-: IfcRoot | GlobalId=s OwnerHistory=@IfcOwnerHistory Name=s Description=s
IfcSpatialStructureElement: IfcSite | RefLatitude=i* RefLongitude=i* RefElevation=r LandTitleNumber=s
  SiteAddress=@IfcPostalAddress
IfcProduct: IfcStructuralActivity | AppliedLoad=@ GlobalOrLocal=e
IfcStructuralItem: IfcStructuralConnection | AppliedCondition=@
IfcStructuralCurveMember: IfcStructuralCurveMemberVarying
IfcProduct: IfcStructuralItem
IfcGroup: IfcStructuralLoadGroup | PredefinedType=e ActionType=e ActionSource=e Coefficient=r Purpose=s
IfcStructuralItem: IfcStructuralMember
IfcStructuralAction: IfcStructuralPointAction
IfcStructuralReaction: IfcStructuralPointReaction
IfcStructuralActivity: IfcStructuralReaction
IfcGroup: IfcStructuralResultGroup | TheoryType=e ResultForLoadGroup=@IfcStructuralLoadGroup IsLinear=b
IfcStructuralConnection: IfcStructuralSurfaceConnection
IfcStructuralMember: IfcStructuralSurfaceMember | PredefinedType=e Thickness=r
IfcGroup: IfcSystem
IfcReinforcingElement: IfcTendon | PredefinedType=e NominalDiameter=r CrossSectionArea=r TensionForce=r PreStress=r
  FrictionCoefficient=r AnchorageSlip=r MinCurvatureRadius=r
IfcObjectDefinition: IfcTypeObject | ApplicableOccurrence=s HasPropertySets=@*
IfcTypeObject: IfcTypeProduct | RepresentationMaps=@IfcRepresentationMap* Tag=s
IfcWall: IfcWallStandardCase
`,
  },
  {
    of: ['IFC2X3', 'IFC4'],
    entities: `
IfcProduct: IfcAnnotation
IfcBuildingElementType: IfcBeamType IfcBuildingElementProxyType IfcColumnType IfcCoveringType IfcCurtainWallType
  IfcMemberType IfcPlateType IfcRailingType IfcRampFlightType IfcSlabType IfcStairFlightType IfcWallType |
  PredefinedType=e
IfcSpatialStructureElement: IfcBuilding | ElevationOfRefHeight=r ElevationOfTerrain=r
  BuildingAddress=@IfcPostalAddress
IfcElement: IfcBuildingElement IfcVirtualElement
IfcElementType: IfcBuildingElementType
IfcBuildingElement: IfcCovering IfcFooting IfcRailing IfcSlab | PredefinedType=e
IfcTypeProduct: IfcDoorStyle | OperationType=e ConstructionType=e ParameterTakesPrecedence=b Sizeable=b
IfcBuildingElement: IfcPile | PredefinedType=e ConstructionType=e
IfcProduct: IfcProxy | ProxyType=e Tag=s
IfcRelationship: IfcRelAssigns | RelatedObjects=@* RelatedObjectsType=e
IfcRelConnects: IfcRelReferencedInSpatialStructure | RelatedElements=@* RelatingStructure=@
IfcTypeProduct: IfcWindowStyle | ConstructionType=e OperationType=e ParameterTakesPrecedence=b Sizeable=b
`,
  },
  {
    of: ['IFC4', 'IFC4X3'],
    entities: `
IfcElementComponent: IfcBuildingElementPart IfcDiscreteAccessory IfcFastener IfcVibrationIsolator | PredefinedType=e
IfcElementComponentType: IfcBuildingElementPartType IfcDiscreteAccessoryType IfcFastenerType IfcVibrationIsolatorType
  | PredefinedType=e
IfcSystem: IfcBuildingSystem | PredefinedType=e LongName=s
IfcFlowSegment: IfcCableCarrierSegment IfcCableSegment IfcDuctSegment IfcPipeSegment | PredefinedType=e
IfcObjectDefinition: IfcContext | ObjectType=s LongName=s Phase=s RepresentationContexts=@*
  UnitsInContext=@IfcUnitAssignment
IfcElementType: IfcElementAssemblyType | PredefinedType=e
IfcQuantitySet: IfcElementQuantity | MethodOfMeasurement=s Quantities=@*
IfcExternalSpatialStructureElement: IfcExternalSpatialElement | PredefinedType=e
IfcSpatialElement: IfcExternalSpatialStructureElement
IfcElementComponent: IfcMechanicalFastener | NominalDiameter=r NominalLength=r PredefinedType=e
IfcElementComponentType: IfcMechanicalFastenerType | PredefinedType=e NominalDiameter=r NominalLength=r
IfcFeatureElementSubtraction: IfcOpeningElement IfcVoidingFeature | PredefinedType=e
IfcObject: IfcProduct | ObjectPlacement=@ Representation=@
IfcContext: IfcProject IfcProjectLibrary
IfcFeatureElementAddition: IfcProjectionElement | PredefinedType=e
IfcPropertySetDefinition: IfcQuantitySet
IfcReinforcingElement: IfcReinforcingBar | NominalDiameter=r CrossSectionArea=r BarLength=r PredefinedType=e
  BarSurface=e
IfcReinforcingElementType: IfcReinforcingBarType | PredefinedType=e NominalDiameter=r CrossSectionArea=r BarLength=r
  BarSurface=e BendingShapeCode=s BendingParameters=?*
IfcElementComponent: IfcReinforcingElement | SteelGrade=s
IfcElementComponentType: IfcReinforcingElementType
IfcReinforcingElement: IfcReinforcingMesh | MeshLength=r MeshWidth=r LongitudinalBarNominalDiameter=r
  TransverseBarNominalDiameter=r LongitudinalBarCrossSectionArea=r TransverseBarCrossSectionArea=r
  LongitudinalBarSpacing=r TransverseBarSpacing=r PredefinedType=e
IfcReinforcingElementType: IfcReinforcingMeshType | PredefinedType=e MeshLength=r MeshWidth=r
  LongitudinalBarNominalDiameter=r TransverseBarNominalDiameter=r LongitudinalBarCrossSectionArea=r
  TransverseBarCrossSectionArea=r LongitudinalBarSpacing=r TransverseBarSpacing=r BendingShapeCode=s
  BendingParameters=?*
IfcRelDecomposes: IfcRelAggregates IfcRelNests | RelatingObject=@ RelatedObjects=@*
IfcRelAssignsToGroup: IfcRelAssignsToGroupByFactor | Factor=r
IfcRelAssigns: IfcRelAssignsToProduct | RelatingProduct=?
IfcRelationship: IfcRelAssociates | RelatedObjects=?*
IfcRelConnects: IfcRelCoversSpaces | RelatingSpace=@IfcSpace RelatedCoverings=@IfcCovering*
IfcRelationship: IfcRelDeclares | RelatingContext=@ RelatedDefinitions=?*
IfcRelationship: IfcRelDecomposes IfcRelDefines
IfcRelDefines: IfcRelDefinesByProperties | RelatedObjects=@* RelatingPropertyDefinition=?
IfcRelDefines: IfcRelDefinesByType | RelatedObjects=@* RelatingType=@IfcTypeObject
IfcRelDecomposes: IfcRelProjectsElement | RelatingElement=@ RelatedFeatureElement=@
IfcRelConnects: IfcRelSpaceBoundary | RelatingSpace=? RelatedBuildingElement=@ ConnectionGeometry=@
  PhysicalOrVirtualBoundary=e InternalOrExternalBoundary=e
IfcRelSpaceBoundary: IfcRelSpaceBoundary1stLevel | ParentBoundary=@IfcRelSpaceBoundary1stLevel
IfcRelSpaceBoundary1stLevel: IfcRelSpaceBoundary2ndLevel | CorrespondingBoundary=@IfcRelSpaceBoundary2ndLevel
IfcRelDecomposes: IfcRelVoidsElement | RelatingBuildingElement=@ RelatedOpeningElement=@
IfcSpatialStructureElement: IfcSpace | PredefinedType=e ElevationWithFlooring=r
IfcSpatialStructureElementType: IfcSpaceType | PredefinedType=e LongName=s
IfcProduct: IfcSpatialElement | LongName=s
IfcTypeProduct: IfcSpatialElementType | ElementType=s
IfcSpatialElement: IfcSpatialStructureElement | CompositionType=e
IfcSpatialElementType: IfcSpatialStructureElementType
IfcSpatialElement: IfcSpatialZone | PredefinedType=e
IfcSpatialElementType: IfcSpatialZoneType | PredefinedType=e LongName=s
IfcStructuralActivity: IfcStructuralAction | DestabilizingLoad=b
IfcSystem: IfcStructuralAnalysisModel | PredefinedType=e OrientationOf2DPlane=@IfcAxis2Placement3D
  LoadedBy=@IfcStructuralLoadGroup* HasResults=@IfcStructuralResultGroup* SharedPlacement=@
IfcStructuralAction: IfcStructuralCurveAction IfcStructuralSurfaceAction | ProjectedOrTrue=e PredefinedType=e
IfcStructuralMember: IfcStructuralCurveMember | PredefinedType=e Axis=@IfcDirection
IfcStructuralReaction: IfcStructuralCurveReaction IfcStructuralSurfaceReaction | PredefinedType=e
IfcStructuralCurveAction: IfcStructuralLinearAction
IfcStructuralLoadGroup: IfcStructuralLoadCase | SelfWeightCoefficients=r*
IfcStructuralSurfaceAction: IfcStructuralPlanarAction
IfcStructuralConnection: IfcStructuralPointConnection | ConditionCoordinateSystem=@IfcAxis2Placement3D
IfcStructuralSurfaceMember: IfcStructuralSurfaceMemberVarying
IfcReinforcingElement: IfcTendonAnchor | PredefinedType=e
IfcReinforcingElementType: IfcTendonAnchorType | PredefinedType=e
IfcReinforcingElementType: IfcTendonType | PredefinedType=e NominalDiameter=r CrossSectionArea=r SheathDiameter=r
IfcSystem: IfcZone | LongName=s
`,
  },
  {
    of: ['IFC2X3'],
    entities: `
IfcBuildingElement: IfcBeam IfcBuildingElementComponent IfcColumn IfcCurtainWall IfcMember IfcPlate IfcRampFlight
  IfcWall
IfcBuildingElementComponent: IfcBuildingElementPart
IfcBuildingElement: IfcBuildingElementProxy | CompositionType=e
IfcEdgeFeature: IfcChamferEdgeFeature | Width=r Height=r
IfcElementComponent: IfcDiscreteAccessory IfcFastener
IfcElementComponentType: IfcDiscreteAccessoryType IfcFastenerType
IfcBuildingElement: IfcDoor IfcWindow | OverallHeight=r OverallWidth=r
IfcFeatureElementSubtraction: IfcEdgeFeature | FeatureLength=r
IfcPropertySetDefinition: IfcElementQuantity | MethodOfMeasurement=s Quantities=@*
IfcProduct: IfcGrid | UAxes=@IfcGridAxis* VAxes=@IfcGridAxis* WAxes=@IfcGridAxis*
IfcFastener: IfcMechanicalFastener | NominalDiameter=r NominalLength=r
IfcFastenerType: IfcMechanicalFastenerType
IfcFeatureElementSubtraction: IfcOpeningElement
IfcObject: IfcProduct | ObjectPlacement=@ Representation=@IfcProductRepresentation
IfcObject: IfcProject | LongName=s Phase=s RepresentationContexts=@IfcRepresentationContext*
  UnitsInContext=@IfcUnitAssignment
IfcFeatureElementAddition: IfcProjectionElement
IfcBuildingElement: IfcRamp IfcRoof IfcStair | ShapeType=e
IfcReinforcingElement: IfcReinforcingBar | NominalDiameter=r CrossSectionArea=r BarLength=r BarRole=e BarSurface=e
IfcBuildingElementComponent: IfcReinforcingElement | SteelGrade=s
IfcReinforcingElement: IfcReinforcingMesh | MeshLength=r MeshWidth=r LongitudinalBarNominalDiameter=r
  TransverseBarNominalDiameter=r LongitudinalBarCrossSectionArea=r TransverseBarCrossSectionArea=r
  LongitudinalBarSpacing=r TransverseBarSpacing=r
IfcRelDecomposes: IfcRelAggregates IfcRelNests
IfcRelAssigns: IfcRelAssignsToProduct | RelatingProduct=@
IfcRelationship: IfcRelAssociates IfcRelDefines | RelatedObjects=@*
IfcRelAssociates: IfcRelAssociatesProfileProperties | RelatingProfileProperties=@
  ProfileSectionLocation=@IfcShapeAspect ProfileOrientation=?
IfcRelConnects: IfcRelConnectsStructuralElement | RelatingElement=@ RelatedStructuralMember=@
IfcRelConnects: IfcRelCoversSpaces | RelatedSpace=@IfcSpace RelatedCoverings=@IfcCovering*
IfcRelationship: IfcRelDecomposes | RelatingObject=@ RelatedObjects=@*
IfcRelDefines: IfcRelDefinesByProperties | RelatingPropertyDefinition=@
IfcRelDefines: IfcRelDefinesByType | RelatingType=@IfcTypeObject
IfcRelConnects: IfcRelProjectsElement | RelatingElement=@ RelatedFeatureElement=@
IfcRelConnects: IfcRelSpaceBoundary | RelatingSpace=@IfcSpace RelatedBuildingElement=@ ConnectionGeometry=@
  PhysicalOrVirtualBoundary=e InternalOrExternalBoundary=e
IfcRelConnects: IfcRelVoidsElement | RelatingBuildingElement=@ RelatedOpeningElement=@
IfcEdgeFeature: IfcRoundedEdgeFeature | Radius=r
IfcSpatialStructureElement: IfcSpace | InteriorOrExteriorSpace=e ElevationWithFlooring=r
IfcSpatialStructureElementType: IfcSpaceType | PredefinedType=e
IfcProduct: IfcSpatialStructureElement | LongName=s CompositionType=e
IfcElementType: IfcSpatialStructureElementType
IfcBuildingElement: IfcStairFlight | NumberOfRiser=i NumberOfTreads=i RiserHeight=r TreadLength=r
IfcStructuralActivity: IfcStructuralAction | DestabilizingLoad=b CausedBy=@
IfcSystem: IfcStructuralAnalysisModel | PredefinedType=e OrientationOf2DPlane=@IfcAxis2Placement3D
  LoadedBy=@IfcStructuralLoadGroup* HasResults=@IfcStructuralResultGroup*
IfcStructuralConnection: IfcStructuralCurveConnection IfcStructuralPointConnection
IfcStructuralMember: IfcStructuralCurveMember | PredefinedType=e
IfcStructuralAction: IfcStructuralLinearAction IfcStructuralPlanarAction | ProjectedOrTrue=e
IfcStructuralLinearAction: IfcStructuralLinearActionVarying | VaryingAppliedLoadLocation=@IfcShapeAspect
  SubsequentAppliedLoads=@*
IfcStructuralPlanarAction: IfcStructuralPlanarActionVarying | VaryingAppliedLoadLocation=@IfcShapeAspect
  SubsequentAppliedLoads=@*
IfcStructuralSurfaceMember: IfcStructuralSurfaceMemberVarying | SubsequentThickness=r*
  VaryingThicknessLocation=@IfcShapeAspect
IfcReinforcingElement: IfcTendonAnchor
IfcDiscreteAccessoryType: IfcVibrationIsolatorType | PredefinedType=e
IfcGroup: IfcZone
`,
  },
  {
    of: ['IFC4'],
    entities: `
IfcBuildingElement: IfcBeam IfcBuildingElementProxy IfcChimney IfcColumn IfcCurtainWall IfcMember IfcPlate IfcRamp
  IfcRampFlight IfcRoof IfcShadingDevice IfcStair IfcWall | PredefinedType=e
IfcBeam: IfcBeamStandardCase
IfcBuildingElementType: IfcChimneyType IfcFootingType IfcPileType IfcRampType IfcRoofType IfcShadingDeviceType
  IfcStairType | PredefinedType=e
IfcColumn: IfcColumnStandardCase
IfcBuildingElement: IfcDoor | OverallHeight=r OverallWidth=r PredefinedType=e OperationType=e
  UserDefinedOperationType=s
IfcDoor: IfcDoorStandardCase
IfcBuildingElementType: IfcDoorType | PredefinedType=e OperationType=e ParameterTakesPrecedence=b
  UserDefinedOperationType=s
IfcProduct: IfcGrid | UAxes=@IfcGridAxis* VAxes=@IfcGridAxis* WAxes=@IfcGridAxis* PredefinedType=e
IfcMember: IfcMemberStandardCase
IfcOpeningElement: IfcOpeningStandardCase
IfcPlate: IfcPlateStandardCase
IfcSlab: IfcSlabElementedCase IfcSlabStandardCase
IfcBuildingElement: IfcStairFlight | NumberOfRisers=i NumberOfTreads=i RiserHeight=r TreadLength=r PredefinedType=e
IfcStructuralConnection: IfcStructuralCurveConnection | Axis=@IfcDirection
IfcWall: IfcWallElementedCase
IfcBuildingElement: IfcWindow | OverallHeight=r OverallWidth=r PredefinedType=e PartitioningType=e
  UserDefinedPartitioningType=s
IfcWindow: IfcWindowStandardCase
IfcBuildingElementType: IfcWindowType | PredefinedType=e PartitioningType=e ParameterTakesPrecedence=b
  UserDefinedPartitioningType=s
`,
  },
  {
    of: ['IFC4X3'],
    entities: `
IfcLinearPositioningElement: IfcAlignment | PredefinedType=e
IfcProduct: IfcAnnotation | PredefinedType=e
IfcBuiltElement: IfcBeam IfcBearing IfcBuildingElementProxy IfcChimney IfcColumn IfcCovering IfcCurtainWall IfcFooting
  IfcMember IfcPlate IfcRailing IfcRamp IfcRampFlight IfcRoof IfcShadingDevice IfcSlab IfcStair IfcWall |
  PredefinedType=e
IfcBuiltElementType: IfcBeamType IfcBearingType IfcBuildingElementProxyType IfcChimneyType IfcColumnType
  IfcCoveringType IfcCurtainWallType IfcFootingType IfcMemberType IfcPlateType IfcRailingType IfcRampFlightType
  IfcRampType IfcRoofType IfcShadingDeviceType IfcSlabType IfcStairFlightType IfcStairType IfcWallType |
  PredefinedType=e
IfcFacility: IfcBridge | PredefinedType=e
IfcFacilityPart: IfcBridgePart IfcFacilityPartCommon | PredefinedType=e
IfcFacility: IfcBuilding | ElevationOfRefHeight=r ElevationOfTerrain=r BuildingAddress=@IfcPostalAddress
IfcElement: IfcBuiltElement
IfcElementType: IfcBuiltElementType
IfcSystem: IfcBuiltSystem | PredefinedType=e LongName=s
IfcDeepFoundation: IfcCaissonFoundation | PredefinedType=e
IfcDeepFoundationType: IfcCaissonFoundationType IfcPileType | PredefinedType=e
IfcFlowSegment: IfcConveyorSegment | PredefinedType=e
IfcBuiltElement: IfcDeepFoundation
IfcBuiltElementType: IfcDeepFoundationType
IfcBuiltElement: IfcDoor | OverallHeight=r OverallWidth=r PredefinedType=e OperationType=e UserDefinedOperationType=s
IfcBuiltElementType: IfcDoorType | PredefinedType=e OperationType=e ParameterTakesPrecedence=b
  UserDefinedOperationType=s
IfcSpatialStructureElement: IfcFacility
IfcSpatialStructureElement: IfcFacilityPart | UsageType=e
IfcPositioningElement: IfcGrid | UAxes=@IfcGridAxis* VAxes=@IfcGridAxis* WAxes=@IfcGridAxis* PredefinedType=e
IfcElementComponent: IfcImpactProtectionDevice IfcVibrationDamper | PredefinedType=e
IfcElementComponentType: IfcImpactProtectionDeviceType IfcSignType IfcVibrationDamperType | PredefinedType=e
IfcPositioningElement: IfcLinearPositioningElement
IfcDeepFoundation: IfcPile | PredefinedType=e ConstructionType=e
IfcProduct: IfcPositioningElement
IfcRelationship: IfcRelAssigns | RelatedObjects=@* RelatedObjectsType=b
IfcRelConnects: IfcRelPositions | RelatingPositioningElement=@ RelatedProducts=@*
IfcRelConnects: IfcRelReferencedInSpatialStructure | RelatedElements=?* RelatingStructure=@
IfcBuiltElement: IfcStairFlight | NumberOfRisers=i NumberOfTreads=i RiserHeight=r TreadLength=r PredefinedType=e
IfcStructuralConnection: IfcStructuralCurveConnection | AxisDirection=@IfcDirection
IfcElement: IfcVirtualElement | PredefinedType=e
IfcBuiltElement: IfcWindow | OverallHeight=r OverallWidth=r PredefinedType=e PartitioningType=e
  UserDefinedPartitioningType=s
IfcBuiltElementType: IfcWindowType | PredefinedType=e PartitioningType=e ParameterTakesPrecedence=b
  UserDefinedPartitioningType=s
`,
  },
];
