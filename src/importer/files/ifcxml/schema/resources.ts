import type { SchemaPart } from './parts.ts';

/**
 * What has neither a GlobalId nor a shape: profiles, materials, properties, units, structural loads, who made the file.
 * The notation is told in `parts.ts`.
 */
export const RESOURCES: readonly SchemaPart[] = [
  {
    of: ['IFC2X3', 'IFC4', 'IFC4X3'],
    entities: `
-: IfcActorRole | Role=e UserDefinedRole=s Description=s
-: IfcAddress | Purpose=e Description=s UserDefinedPurpose=s
-: IfcApplication | ApplicationDeveloper=@IfcOrganization Version=s ApplicationFullName=s ApplicationIdentifier=s
IfcProfileDef: IfcArbitraryClosedProfileDef | OuterCurve=@
IfcProfileDef: IfcArbitraryOpenProfileDef | Curve=@
IfcArbitraryClosedProfileDef: IfcArbitraryProfileDefWithVoids | InnerCurves=@*
-: IfcBoundaryCondition IfcStructuralConnectionCondition IfcStructuralLoad | Name=s
IfcArbitraryOpenProfileDef: IfcCenterLineProfileDef | Thickness=r
IfcCircleProfileDef: IfcCircleHollowProfileDef | WallThickness=r
IfcParameterizedProfileDef: IfcCircleProfileDef | Radius=r
IfcProperty: IfcComplexProperty | UsageName=s HasProperties=@*
IfcNamedUnit: IfcContextDependentUnit | Name=s
IfcNamedUnit: IfcConversionBasedUnit | Name=s ConversionFactor=@IfcMeasureWithUnit
-: IfcDerivedUnitElement | Unit=@ Exponent=i
-: IfcDimensionalExponents | LengthExponent=i MassExponent=i TimeExponent=i ElectricCurrentExponent=i
  ThermodynamicTemperatureExponent=i AmountOfSubstanceExponent=i LuminousIntensityExponent=i
IfcParameterizedProfileDef: IfcEllipseProfileDef | SemiAxis1=r SemiAxis2=r
IfcStructuralConnectionCondition: IfcFailureConnectionCondition | TensionFailureX=r TensionFailureY=r
  TensionFailureZ=r CompressionFailureX=r CompressionFailureY=r CompressionFailureZ=r
-: IfcMaterialList | Materials=@IfcMaterial*
-: IfcMeasureWithUnit | ValueComponent=? UnitComponent=?
-: IfcNamedUnit | Dimensions=@IfcDimensionalExponents UnitType=e
-: IfcOwnerHistory | OwningUser=@IfcPersonAndOrganization OwningApplication=@IfcApplication State=e ChangeAction=e
  LastModifiedDate=i LastModifyingUser=@IfcPersonAndOrganization LastModifyingApplication=@IfcApplication
  CreationDate=i
IfcProfileDef: IfcParameterizedProfileDef | Position=@IfcAxis2Placement2D
-: IfcPersonAndOrganization | ThePerson=@IfcPerson TheOrganization=@IfcOrganization Roles=@IfcActorRole*
IfcPhysicalQuantity: IfcPhysicalComplexQuantity | HasQuantities=@* Discrimination=s Quality=s Usage=s
-: IfcPhysicalQuantity | Name=s Description=s
IfcPhysicalQuantity: IfcPhysicalSimpleQuantity | Unit=@
IfcAddress: IfcPostalAddress | InternalLocation=s AddressLines=s* PostalBox=s Town=s Region=s PostalCode=s Country=s
-: IfcPresentationLayerAssignment | Name=s Description=s AssignedItems=?* Identifier=s
-: IfcProfileDef | ProfileType=e ProfileName=s
IfcSimpleProperty: IfcPropertyEnumeratedValue | EnumerationValues=?* EnumerationReference=@IfcPropertyEnumeration
IfcSimpleProperty: IfcPropertyListValue | ListValues=?* Unit=?
IfcSimpleProperty: IfcPropertySingleValue | NominalValue=? Unit=?
IfcRectangleProfileDef: IfcRectangleHollowProfileDef | WallThickness=r InnerFilletRadius=r OuterFilletRadius=r
IfcParameterizedProfileDef: IfcRectangleProfileDef | XDim=r YDim=r
IfcRectangleProfileDef: IfcRoundedRectangleProfileDef | RoundingRadius=r
IfcNamedUnit: IfcSIUnit | Prefix=e Name=e -Dimensions
IfcProperty: IfcSimpleProperty
IfcStructuralConnectionCondition: IfcSlippageConnectionCondition | SlippageX=r SlippageY=r SlippageZ=r
IfcStructuralLoadStatic: IfcStructuralLoadLinearForce | LinearForceX=r LinearForceY=r LinearForceZ=r LinearMomentX=r
  LinearMomentY=r LinearMomentZ=r
IfcStructuralLoadStatic: IfcStructuralLoadPlanarForce | PlanarForceX=r PlanarForceY=r PlanarForceZ=r
IfcStructuralLoadStatic: IfcStructuralLoadSingleDisplacement | DisplacementX=r DisplacementY=r DisplacementZ=r
  RotationalDisplacementRX=r RotationalDisplacementRY=r RotationalDisplacementRZ=r
IfcStructuralLoadSingleDisplacement: IfcStructuralLoadSingleDisplacementDistortion | Distortion=r
IfcStructuralLoadStatic: IfcStructuralLoadSingleForce | ForceX=r ForceY=r ForceZ=r MomentX=r MomentY=r MomentZ=r
IfcStructuralLoadSingleForce: IfcStructuralLoadSingleForceWarping | WarpingMoment=r
IfcParameterizedProfileDef: IfcTrapeziumProfileDef | BottomXDim=r TopXDim=r YDim=r TopXOffset=r
-: IfcUnitAssignment | Units=?*
IfcParameterizedProfileDef: IfcZShapeProfileDef | Depth=r FlangeWidth=r WebThickness=r FlangeThickness=r
  FilletRadius=r EdgeRadius=r
`,
  },
  {
    of: ['IFC2X3', 'IFC4'],
    entities: `
-: IfcDerivedUnit | Elements=@IfcDerivedUnitElement* UnitType=e UserDefinedType=s
`,
  },
  {
    of: ['IFC4', 'IFC4X3'],
    entities: `
IfcParameterizedProfileDef: IfcAsymmetricIShapeProfileDef | BottomFlangeWidth=r OverallDepth=r WebThickness=r
  BottomFlangeThickness=r BottomFlangeFilletRadius=r TopFlangeWidth=r TopFlangeThickness=r TopFlangeFilletRadius=r
  BottomFlangeEdgeRadius=r BottomFlangeSlope=r TopFlangeEdgeRadius=r TopFlangeSlope=r
IfcBoundaryCondition: IfcBoundaryEdgeCondition | TranslationalStiffnessByLengthX=? TranslationalStiffnessByLengthY=?
  TranslationalStiffnessByLengthZ=? RotationalStiffnessByLengthX=? RotationalStiffnessByLengthY=?
  RotationalStiffnessByLengthZ=?
IfcBoundaryCondition: IfcBoundaryFaceCondition | TranslationalStiffnessByAreaX=? TranslationalStiffnessByAreaY=?
  TranslationalStiffnessByAreaZ=?
IfcBoundaryCondition: IfcBoundaryNodeCondition | TranslationalStiffnessX=? TranslationalStiffnessY=?
  TranslationalStiffnessZ=? RotationalStiffnessX=? RotationalStiffnessY=? RotationalStiffnessZ=?
IfcBoundaryNodeCondition: IfcBoundaryNodeConditionWarping | WarpingStiffness=?
IfcParameterizedProfileDef: IfcCShapeProfileDef | Depth=r Width=r WallThickness=r Girth=r InternalFilletRadius=r
IfcProfileDef: IfcCompositeProfileDef | Profiles=@IfcProfileDef* Label=s
IfcConversionBasedUnit: IfcConversionBasedUnitWithOffset | ConversionOffset=r
-: IfcCoordinateOperation | SourceCRS=? TargetCRS=@
IfcProfileDef: IfcDerivedProfileDef | ParentProfile=@IfcProfileDef Operator=@IfcCartesianTransformationOperator2D
  Label=s
IfcPropertyAbstraction: IfcExtendedProperties | Name=s Description=s Properties=@*
IfcParameterizedProfileDef: IfcIShapeProfileDef | OverallWidth=r OverallDepth=r WebThickness=r FlangeThickness=r
  FilletRadius=r FlangeEdgeRadius=r FlangeSlope=r
IfcParameterizedProfileDef: IfcLShapeProfileDef | Depth=r Width=r Thickness=r FilletRadius=r EdgeRadius=r LegSlope=r
IfcCoordinateOperation: IfcMapConversion | Eastings=r Northings=r OrthogonalHeight=r XAxisAbscissa=r XAxisOrdinate=r
  Scale=r
IfcMaterialDefinition: IfcMaterial | Name=s Description=s Category=s
IfcMaterialDefinition: IfcMaterialConstituent | Name=s Description=s Material=@IfcMaterial Fraction=r Category=s
IfcMaterialDefinition: IfcMaterialConstituentSet | Name=s Description=s MaterialConstituents=@IfcMaterialConstituent*
-: IfcMaterialDefinition IfcMaterialUsageDefinition IfcPropertyAbstraction
IfcMaterialDefinition: IfcMaterialLayer | Material=@IfcMaterial LayerThickness=r IsVentilated=l Name=s Description=s
  Category=s Priority=i
IfcMaterialDefinition: IfcMaterialLayerSet | MaterialLayers=@IfcMaterialLayer* LayerSetName=s Description=s
IfcMaterialUsageDefinition: IfcMaterialLayerSetUsage | ForLayerSet=@IfcMaterialLayerSet LayerSetDirection=e
  DirectionSense=e OffsetFromReferenceLine=r ReferenceExtent=r
IfcMaterialLayer: IfcMaterialLayerWithOffsets | OffsetDirection=e OffsetValues=r*
IfcMaterialDefinition: IfcMaterialProfile | Name=s Description=s Material=@IfcMaterial Profile=@IfcProfileDef
  Priority=i Category=s
IfcMaterialDefinition: IfcMaterialProfileSet | Name=s Description=s MaterialProfiles=@IfcMaterialProfile*
  CompositeProfile=@IfcCompositeProfileDef
IfcMaterialUsageDefinition: IfcMaterialProfileSetUsage | ForProfileSet=@IfcMaterialProfileSet CardinalPoint=i
  ReferenceExtent=r
IfcMaterialProfileSetUsage: IfcMaterialProfileSetUsageTapering | ForProfileEndSet=@IfcMaterialProfileSet
  CardinalEndPoint=i
IfcMaterialProfile: IfcMaterialProfileWithOffsets | OffsetValues=r*
IfcExtendedProperties: IfcMaterialProperties | Material=@
IfcDerivedProfileDef: IfcMirroredProfileDef | -Operator
-: IfcMonetaryUnit | Currency=s
-: IfcOrganization | Identification=s Name=s Description=s Roles=@IfcActorRole* Addresses=@*
-: IfcPerson | Identification=s FamilyName=s GivenName=s MiddleNames=s* PrefixTitles=s* SuffixTitles=s*
  Roles=@IfcActorRole* Addresses=@*
IfcExtendedProperties: IfcProfileProperties | ProfileDefinition=@IfcProfileDef
IfcSimpleProperty: IfcPropertyBoundedValue | UpperBoundValue=? LowerBoundValue=? Unit=? SetPointValue=?
IfcPropertyAbstraction: IfcPropertyEnumeration | Name=s EnumerationValues=?* Unit=?
IfcSimpleProperty: IfcPropertyTableValue | DefiningValues=?* DefinedValues=?* Expression=s DefiningUnit=?
  DefinedUnit=? CurveInterpolation=e
IfcPhysicalSimpleQuantity: IfcQuantityArea | AreaValue=r Formula=s
IfcPhysicalSimpleQuantity: IfcQuantityLength | LengthValue=r Formula=s
IfcPhysicalSimpleQuantity: IfcQuantityTime | TimeValue=r Formula=s
IfcPhysicalSimpleQuantity: IfcQuantityVolume | VolumeValue=r Formula=s
IfcPhysicalSimpleQuantity: IfcQuantityWeight | WeightValue=r Formula=s
IfcStructuralLoad: IfcStructuralLoadConfiguration | Values=@* Locations=r**
IfcStructuralLoad: IfcStructuralLoadOrResult
IfcStructuralLoadOrResult: IfcStructuralLoadStatic
IfcStructuralLoadStatic: IfcStructuralLoadTemperature | DeltaTConstant=r DeltaTY=r DeltaTZ=r
IfcStructuralLoadOrResult: IfcSurfaceReinforcementArea | SurfaceReinforcement1=r* SurfaceReinforcement2=r*
  ShearReinforcement=r
IfcParameterizedProfileDef: IfcTShapeProfileDef | Depth=r FlangeWidth=r WebThickness=r FlangeThickness=r
  FilletRadius=r FlangeEdgeRadius=r WebEdgeRadius=r WebSlope=r FlangeSlope=r
IfcAddress: IfcTelecomAddress | TelephoneNumbers=s* FacsimileNumbers=s* PagerNumber=s ElectronicMailAddresses=s*
  WWWHomePageURL=s MessagingIDs=s*
IfcParameterizedProfileDef: IfcUShapeProfileDef | Depth=r FlangeWidth=r WebThickness=r FlangeThickness=r
  FilletRadius=r EdgeRadius=r FlangeSlope=r
`,
  },
  {
    of: ['IFC2X3'],
    entities: `
IfcIShapeProfileDef: IfcAsymmetricIShapeProfileDef | TopFlangeWidth=r TopFlangeThickness=r TopFlangeFilletRadius=r
  CentreOfGravityInY=r
IfcBoundaryCondition: IfcBoundaryEdgeCondition | LinearStiffnessByLengthX=r LinearStiffnessByLengthY=r
  LinearStiffnessByLengthZ=r RotationalStiffnessByLengthX=r RotationalStiffnessByLengthY=r
  RotationalStiffnessByLengthZ=r
IfcBoundaryCondition: IfcBoundaryFaceCondition | LinearStiffnessByAreaX=r LinearStiffnessByAreaY=r
  LinearStiffnessByAreaZ=r
IfcBoundaryCondition: IfcBoundaryNodeCondition | LinearStiffnessX=r LinearStiffnessY=r LinearStiffnessZ=r
  RotationalStiffnessX=r RotationalStiffnessY=r RotationalStiffnessZ=r
IfcBoundaryNodeCondition: IfcBoundaryNodeConditionWarping | WarpingStiffness=r
IfcParameterizedProfileDef: IfcCShapeProfileDef | Depth=r Width=r WallThickness=r Girth=r InternalFilletRadius=r
  CentreOfGravityInX=r
IfcProfileDef: IfcCompositeProfileDef | Profiles=@* Label=s
IfcParameterizedProfileDef: IfcCraneRailAShapeProfileDef | OverallHeight=r BaseWidth2=r Radius=r HeadWidth=r
  HeadDepth2=r HeadDepth3=r WebThickness=r BaseWidth4=r BaseDepth1=r BaseDepth2=r BaseDepth3=r CentreOfGravityInY=r
IfcParameterizedProfileDef: IfcCraneRailFShapeProfileDef | OverallHeight=r HeadWidth=r Radius=r HeadDepth2=r
  HeadDepth3=r WebThickness=r BaseDepth1=r BaseDepth2=r CentreOfGravityInY=r
IfcProfileDef: IfcDerivedProfileDef | ParentProfile=@ Operator=@IfcCartesianTransformationOperator2D Label=s
IfcMaterialProperties: IfcExtendedMaterialProperties | ExtendedProperties=@* Description=s Name=s
IfcMaterialProperties: IfcGeneralMaterialProperties | MolecularWeight=r Porosity=r MassDensity=r
IfcProfileProperties: IfcGeneralProfileProperties | PhysicalWeight=r Perimeter=r MinimumPlateThickness=r
  MaximumPlateThickness=r CrossSectionArea=r
IfcParameterizedProfileDef: IfcIShapeProfileDef | OverallWidth=r OverallDepth=r WebThickness=r FlangeThickness=r
  FilletRadius=r
IfcParameterizedProfileDef: IfcLShapeProfileDef | Depth=r Width=r Thickness=r FilletRadius=r EdgeRadius=r LegSlope=r
  CentreOfGravityInX=r CentreOfGravityInY=r
-: IfcMaterial | Name=s
-: IfcMaterialLayer | Material=@IfcMaterial LayerThickness=r IsVentilated=l
-: IfcMaterialLayerSet | MaterialLayers=@IfcMaterialLayer* LayerSetName=s
-: IfcMaterialLayerSetUsage | ForLayerSet=@IfcMaterialLayerSet LayerSetDirection=e DirectionSense=e
  OffsetFromReferenceLine=r
-: IfcMaterialProperties | Material=@IfcMaterial
IfcMechanicalMaterialProperties: IfcMechanicalConcreteMaterialProperties | CompressiveStrength=r MaxAggregateSize=r
  AdmixturesDescription=s Workability=s ProtectivePoreRatio=r WaterImpermeability=s
IfcMaterialProperties: IfcMechanicalMaterialProperties | DynamicViscosity=r YoungModulus=r ShearModulus=r
  PoissonRatio=r ThermalExpansionCoefficient=r
IfcMechanicalMaterialProperties: IfcMechanicalSteelMaterialProperties | YieldStress=r UltimateStress=r
  UltimateStrain=r HardeningModule=r ProportionalStress=r PlasticStrain=r Relaxations=@IfcRelaxation*
-: IfcMonetaryUnit | Currency=e
-: IfcOrganization | Id=s Name=s Description=s Roles=@IfcActorRole* Addresses=@*
-: IfcPerson | Id=s FamilyName=s GivenName=s MiddleNames=s* PrefixTitles=s* SuffixTitles=s* Roles=@IfcActorRole*
  Addresses=@*
-: IfcProfileProperties | ProfileName=s ProfileDefinition=@
-: IfcProperty | Name=s Description=s
IfcSimpleProperty: IfcPropertyBoundedValue | UpperBoundValue=? LowerBoundValue=? Unit=?
-: IfcPropertyEnumeration | Name=s EnumerationValues=?* Unit=?
IfcSimpleProperty: IfcPropertyTableValue | DefiningValues=?* DefinedValues=?* Expression=s DefiningUnit=?
  DefinedUnit=?
IfcPhysicalSimpleQuantity: IfcQuantityArea | AreaValue=r
IfcPhysicalSimpleQuantity: IfcQuantityCount | CountValue=r
IfcPhysicalSimpleQuantity: IfcQuantityLength | LengthValue=r
IfcPhysicalSimpleQuantity: IfcQuantityTime | TimeValue=r
IfcPhysicalSimpleQuantity: IfcQuantityVolume | VolumeValue=r
IfcPhysicalSimpleQuantity: IfcQuantityWeight | WeightValue=r
IfcStructuralLoad: IfcStructuralLoadStatic
IfcStructuralLoadStatic: IfcStructuralLoadTemperature | DeltaT_Constant=r DeltaT_Y=r DeltaT_Z=r
IfcGeneralProfileProperties: IfcStructuralProfileProperties | TorsionalConstantX=r MomentOfInertiaYZ=r
  MomentOfInertiaY=r MomentOfInertiaZ=r WarpingConstant=r ShearCentreZ=r ShearCentreY=r ShearDeformationAreaZ=r
  ShearDeformationAreaY=r MaximumSectionModulusY=r MinimumSectionModulusY=r MaximumSectionModulusZ=r
  MinimumSectionModulusZ=r TorsionalSectionModulus=r CentreOfGravityInX=r CentreOfGravityInY=r
IfcStructuralProfileProperties: IfcStructuralSteelProfileProperties | ShearAreaZ=r ShearAreaY=r PlasticShapeFactorY=r
  PlasticShapeFactorZ=r
IfcParameterizedProfileDef: IfcTShapeProfileDef | Depth=r FlangeWidth=r WebThickness=r FlangeThickness=r
  FilletRadius=r FlangeEdgeRadius=r WebEdgeRadius=r WebSlope=r FlangeSlope=r CentreOfGravityInY=r
IfcAddress: IfcTelecomAddress | TelephoneNumbers=s* FacsimileNumbers=s* PagerNumber=s ElectronicMailAddresses=s*
  WWWHomePageURL=s
IfcParameterizedProfileDef: IfcUShapeProfileDef | Depth=r FlangeWidth=r WebThickness=r FlangeThickness=r
  FilletRadius=r EdgeRadius=r FlangeSlope=r CentreOfGravityInX=r
`,
  },
  {
    of: ['IFC4'],
    entities: `
-: IfcCoordinateReferenceSystem | Name=s Description=s GeodeticDatum=s VerticalDatum=s
IfcCoordinateReferenceSystem: IfcProjectedCRS | MapProjection=s MapZone=s MapUnit=@
IfcPropertyAbstraction: IfcProperty | Name=s Description=s
IfcPhysicalSimpleQuantity: IfcQuantityCount | CountValue=r Formula=s
`,
  },
  {
    of: ['IFC4X3'],
    entities: `
-: IfcCoordinateReferenceSystem | Name=s Description=s GeodeticDatum=s
-: IfcDerivedUnit | Elements=@IfcDerivedUnitElement* UnitType=e UserDefinedType=s Name=s
IfcCoordinateReferenceSystem: IfcGeographicCRS | PrimeMeridian=s AngleUnit=@ HeightUnit=@
IfcMapConversion: IfcMapConversionScaled | FactorX=r FactorY=r FactorZ=r
IfcProfileDef: IfcOpenCrossProfileDef | HorizontalWidths=b Widths=r* Slopes=r* Tags=s* OffsetPoint=@IfcCartesianPoint
IfcCoordinateReferenceSystem: IfcProjectedCRS | VerticalDatum=s MapProjection=s MapZone=s MapUnit=@
IfcPropertyAbstraction: IfcProperty | Name=s Specification=s
IfcPhysicalSimpleQuantity: IfcQuantityCount | CountValue=i Formula=s
IfcPhysicalSimpleQuantity: IfcQuantityNumber | NumberValue=r Formula=s
`,
  },
];
