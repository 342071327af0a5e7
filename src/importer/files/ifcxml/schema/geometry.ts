import type { SchemaPart } from './parts.ts';

/** Shapes: representations and their items, placements, contexts, grid axes. The notation is told in `parts.ts`. */
export const GEOMETRY: readonly SchemaPart[] = [
  {
    of: ['IFC2X3', 'IFC4', 'IFC4X3'],
    entities: `
IfcPlacement: IfcAxis1Placement | Axis=@IfcDirection
IfcPlacement: IfcAxis2Placement2D | RefDirection=@IfcDirection
IfcPlacement: IfcAxis2Placement3D | Axis=@IfcDirection RefDirection=@IfcDirection
IfcBoundedCurve: IfcBSplineCurve | Degree=i ControlPointsList=@IfcCartesianPoint* CurveForm=e ClosedCurve=l
  SelfIntersect=l
IfcCsgPrimitive3D: IfcBlock | XLength=r YLength=r ZLength=r
IfcBooleanResult: IfcBooleanClippingResult
IfcGeometricRepresentationItem: IfcBooleanResult | Operator=e FirstOperand=? SecondOperand=?
IfcCurve: IfcBoundedCurve
IfcSurface: IfcBoundedSurface
IfcGeometricRepresentationItem: IfcBoundingBox | Corner=@IfcCartesianPoint XDim=r YDim=r ZDim=r
IfcHalfSpaceSolid: IfcBoxedHalfSpace | Enclosure=@IfcBoundingBox
IfcPoint: IfcCartesianPoint | Coordinates=r*
IfcGeometricRepresentationItem: IfcCartesianTransformationOperator | Axis1=@IfcDirection Axis2=@IfcDirection
  LocalOrigin=@IfcCartesianPoint Scale=r
IfcCartesianTransformationOperator: IfcCartesianTransformationOperator2D
IfcCartesianTransformationOperator2D: IfcCartesianTransformationOperator2DnonUniform | Scale2=r
IfcCartesianTransformationOperator: IfcCartesianTransformationOperator3D | Axis3=@IfcDirection
IfcCartesianTransformationOperator3D: IfcCartesianTransformationOperator3DnonUniform | Scale2=r Scale3=r
IfcConic: IfcCircle | Radius=r
IfcConnectedFaceSet: IfcClosedShell IfcOpenShell
IfcCurve: IfcConic | Position=?
IfcTopologicalRepresentationItem: IfcConnectedFaceSet | CfsFaces=@IfcFace*
IfcConnectionGeometry: IfcConnectionCurveGeometry | CurveOnRelatingElement=? CurveOnRelatedElement=?
-: IfcConnectionGeometry IfcRepresentationItem
IfcConnectionPointGeometry: IfcConnectionPointEccentricity | EccentricityInX=r EccentricityInY=r EccentricityInZ=r
IfcConnectionGeometry: IfcConnectionPointGeometry | PointOnRelatingElement=? PointOnRelatedElement=?
IfcConnectionGeometry: IfcConnectionSurfaceGeometry | SurfaceOnRelatingElement=? SurfaceOnRelatedElement=?
IfcGeometricRepresentationItem: IfcCsgPrimitive3D | Position=@IfcAxis2Placement3D
IfcSolidModel: IfcCsgSolid | TreeRootExpression=?
IfcGeometricRepresentationItem: IfcCurve IfcPoint IfcSolidModel IfcSurface
IfcBoundedSurface: IfcCurveBoundedPlane | BasisSurface=@IfcPlane OuterBoundary=@ InnerBoundaries=@*
IfcGeometricRepresentationItem: IfcDirection | DirectionRatios=r*
IfcTopologicalRepresentationItem: IfcEdge | EdgeStart=@IfcVertex EdgeEnd=@IfcVertex
IfcEdge: IfcEdgeCurve | EdgeGeometry=@ SameSense=b
IfcLoop: IfcEdgeLoop | EdgeList=@IfcOrientedEdge*
IfcSurface: IfcElementarySurface | Position=@IfcAxis2Placement3D
IfcConic: IfcEllipse | SemiAxis1=r SemiAxis2=r
IfcSweptAreaSolid: IfcExtrudedAreaSolid | ExtrudedDirection=@IfcDirection Depth=r
IfcTopologicalRepresentationItem: IfcFace | Bounds=@IfcFaceBound*
IfcGeometricRepresentationItem: IfcFaceBasedSurfaceModel | FbsmFaces=@IfcConnectedFaceSet*
IfcTopologicalRepresentationItem: IfcFaceBound | Bound=@IfcLoop Orientation=b
IfcFaceBound: IfcFaceOuterBound
IfcFace: IfcFaceSurface | FaceSurface=@ SameSense=b
IfcManifoldSolidBrep: IfcFacetedBrep
IfcGeometricSet: IfcGeometricCurveSet
IfcRepresentationContext: IfcGeometricRepresentationContext | CoordinateSpaceDimension=i Precision=r
  WorldCoordinateSystem=? TrueNorth=@IfcDirection
IfcRepresentationItem: IfcGeometricRepresentationItem IfcTopologicalRepresentationItem
IfcGeometricRepresentationContext: IfcGeometricRepresentationSubContext |
  ParentContext=@IfcGeometricRepresentationContext TargetScale=r TargetView=e UserDefinedTargetView=s
  -WorldCoordinateSystem -CoordinateSpaceDimension -TrueNorth -Precision
IfcGeometricRepresentationItem: IfcGeometricSet | Elements=?*
-: IfcGridAxis | AxisTag=s AxisCurve=@ SameSense=b
IfcGeometricRepresentationItem: IfcHalfSpaceSolid | BaseSurface=@ AgreementFlag=b
IfcCurve: IfcLine | Pnt=@IfcCartesianPoint Dir=@IfcVector
IfcTopologicalRepresentationItem: IfcLoop IfcVertex
IfcSolidModel: IfcManifoldSolidBrep | Outer=@IfcClosedShell
IfcRepresentationItem: IfcMappedItem | MappingSource=@IfcRepresentationMap MappingTarget=@
IfcProductRepresentation: IfcMaterialDefinitionRepresentation | RepresentedMaterial=@IfcMaterial
IfcEdge: IfcOrientedEdge | EdgeElement=@IfcEdge Orientation=b -EdgeStart -EdgeEnd
IfcTopologicalRepresentationItem: IfcPath | EdgeList=@IfcOrientedEdge*
IfcElementarySurface: IfcPlane
IfcPoint: IfcPointOnCurve | BasisCurve=@ PointParameter=r
IfcPoint: IfcPointOnSurface | BasisSurface=@ PointParameterU=r PointParameterV=r
IfcLoop: IfcPolyLoop | Polygon=@IfcCartesianPoint*
IfcHalfSpaceSolid: IfcPolygonalBoundedHalfSpace | Position=@IfcAxis2Placement3D PolygonalBoundary=@
IfcBoundedCurve: IfcPolyline | Points=@IfcCartesianPoint*
IfcProductRepresentation: IfcProductDefinitionShape
IfcCsgPrimitive3D: IfcRectangularPyramid | XLength=r YLength=r Height=r
IfcBoundedSurface: IfcRectangularTrimmedSurface | BasisSurface=@ U1=r V1=r U2=r V2=r Usense=b Vsense=b
-: IfcRepresentationContext | ContextIdentifier=s ContextType=s
IfcSweptAreaSolid: IfcRevolvedAreaSolid | Axis=@IfcAxis1Placement Angle=r
IfcCsgPrimitive3D: IfcRightCircularCone | Height=r BottomRadius=r
IfcCsgPrimitive3D: IfcRightCircularCylinder | Height=r Radius=r
IfcRepresentation: IfcShapeModel
IfcShapeModel: IfcShapeRepresentation IfcTopologyRepresentation
IfcGeometricRepresentationItem: IfcShellBasedSurfaceModel | SbsmBoundary=?*
IfcCsgPrimitive3D: IfcSphere | Radius=r
IfcEdge: IfcSubedge | ParentEdge=@IfcEdge
IfcSweptSurface: IfcSurfaceOfLinearExtrusion | ExtrudedDirection=@IfcDirection Depth=r
IfcSweptSurface: IfcSurfaceOfRevolution | AxisPosition=@IfcAxis1Placement
IfcSolidModel: IfcSweptDiskSolid | Directrix=@ Radius=r InnerRadius=r StartParam=r EndParam=r
IfcBoundedCurve: IfcTrimmedCurve | BasisCurve=@ Trim1=?* Trim2=?* SenseAgreement=b MasterRepresentation=e
IfcGeometricRepresentationItem: IfcVector | Orientation=@IfcDirection Magnitude=r
IfcLoop: IfcVertexLoop | LoopVertex=@IfcVertex
IfcVertex: IfcVertexPoint | VertexGeometry=@
-: IfcVirtualGridIntersection | IntersectingAxes=@IfcGridAxis* OffsetDistances=r*
`,
  },
  {
    of: ['IFC2X3', 'IFC4'],
    entities: `
IfcBoundedCurve: IfcCompositeCurve | Segments=@IfcCompositeCurveSegment* SelfIntersect=l
IfcGeometricRepresentationItem: IfcCompositeCurveSegment | Transition=e SameSense=b ParentCurve=@
IfcObjectPlacement: IfcLocalPlacement | PlacementRelTo=@ RelativePlacement=?
-: IfcObjectPlacement
IfcCurve: IfcOffsetCurve2D | BasisCurve=@ Distance=r SelfIntersect=l
IfcCurve: IfcOffsetCurve3D | BasisCurve=@ Distance=r SelfIntersect=l RefDirection=@IfcDirection
IfcGeometricRepresentationItem: IfcPlacement | Location=@IfcCartesianPoint
IfcSweptAreaSolid: IfcSurfaceCurveSweptAreaSolid | Directrix=@ StartParam=r EndParam=r ReferenceSurface=@
`,
  },
  {
    of: ['IFC4', 'IFC4X3'],
    entities: `
IfcManifoldSolidBrep: IfcAdvancedBrep
IfcAdvancedBrep: IfcAdvancedBrepWithVoids | Voids=@IfcClosedShell*
IfcFaceSurface: IfcAdvancedFace
IfcBSplineCurve: IfcBSplineCurveWithKnots | KnotMultiplicities=i* Knots=r* KnotSpec=e
IfcCompositeCurveOnSurface: IfcBoundaryCurve
IfcGeometricRepresentationItem: IfcCartesianPointList IfcTessellatedItem
IfcCompositeCurve: IfcCompositeCurveOnSurface
IfcConnectionGeometry: IfcConnectionVolumeGeometry | VolumeOnRelatingElement=? VolumeOnRelatedElement=?
IfcBoundedSurface: IfcCurveBoundedSurface | BasisSurface=@ Boundaries=@IfcBoundaryCurve* ImplicitOuter=b
IfcElementarySurface: IfcCylindricalSurface IfcSphericalSurface | Radius=r
IfcExtrudedAreaSolid: IfcExtrudedAreaSolidTapered | EndSweptArea=@IfcProfileDef
IfcFacetedBrep: IfcFacetedBrepWithVoids | Voids=@IfcClosedShell*
IfcObjectPlacement: IfcGridPlacement | PlacementLocation=@IfcVirtualGridIntersection PlacementRefDirection=?
IfcBoundedCurve: IfcIndexedPolyCurve | Points=@ Segments=?* SelfIntersect=b
IfcTessellatedItem: IfcIndexedPolygonalFace | CoordIndex=i*
IfcIndexedPolygonalFace: IfcIndexedPolygonalFaceWithVoids | InnerCoordIndices=i**
IfcSurfaceCurve: IfcIntersectionCurve IfcSeamCurve
IfcBoundaryCurve: IfcOuterBoundaryCurve
IfcCurve: IfcPcurve | BasisSurface=@ ReferenceCurve=@
IfcTessellatedFaceSet: IfcPolygonalFaceSet | Closed=b Faces=@IfcIndexedPolygonalFace* PnIndex=i*
-: IfcProductRepresentation | Name=s Description=s Representations=@*
IfcBSplineCurveWithKnots: IfcRationalBSplineCurveWithKnots | WeightsData=r*
IfcCompositeCurveSegment: IfcReparametrisedCompositeCurveSegment | ParamLength=r
-: IfcRepresentation | ContextOfItems=@ RepresentationIdentifier=s RepresentationType=s Items=@*
-: IfcRepresentationMap | MappingOrigin=? MappedRepresentation=@
IfcRevolvedAreaSolid: IfcRevolvedAreaSolidTapered | EndSweptArea=@IfcProfileDef
IfcGeometricRepresentationItem: IfcSectionedSpine | SpineCurve=@IfcCompositeCurve CrossSections=@IfcProfileDef*
  CrossSectionPositions=@IfcAxis2Placement3D*
-: IfcShapeAspect | ShapeRepresentations=@* Name=s Description=s ProductDefinitional=l PartOfProductDefinitionShape=?
IfcCurve: IfcSurfaceCurve | Curve3D=@ AssociatedGeometry=@IfcPcurve* MasterRepresentation=e
IfcSolidModel: IfcSweptAreaSolid | SweptArea=@IfcProfileDef Position=@IfcAxis2Placement3D
IfcSweptDiskSolid: IfcSweptDiskSolidPolygonal | FilletRadius=r
IfcSurface: IfcSweptSurface | SweptCurve=@IfcProfileDef Position=@IfcAxis2Placement3D
IfcTessellatedItem: IfcTessellatedFaceSet | Coordinates=@IfcCartesianPointList3D
IfcElementarySurface: IfcToroidalSurface | MajorRadius=r MinorRadius=r
IfcTessellatedFaceSet: IfcTriangulatedFaceSet | Normals=r*3* Closed=b CoordIndex=i*3* PnIndex=i*
`,
  },
  {
    of: ['IFC2X3'],
    entities: `
IfcCompositeCurve: Ifc2DCompositeCurve
IfcBSplineCurve: IfcBezierCurve
IfcConnectionGeometry: IfcConnectionPortGeometry | LocationAtRelatingElement=? LocationAtRelatedElement=?
  ProfileOfPort=@
IfcManifoldSolidBrep: IfcFacetedBrepWithVoids | Voids=@IfcClosedShell*
IfcObjectPlacement: IfcGridPlacement | PlacementLocation=@IfcVirtualGridIntersection
  PlacementRefDirection=@IfcVirtualGridIntersection
-: IfcProductRepresentation | Name=s Description=s Representations=@IfcRepresentation*
IfcBezierCurve: IfcRationalBezierCurve | WeightsData=r*
-: IfcRepresentation | ContextOfItems=@IfcRepresentationContext RepresentationIdentifier=s RepresentationType=s
  Items=@*
-: IfcRepresentationMap | MappingOrigin=? MappedRepresentation=@IfcRepresentation
IfcGeometricRepresentationItem: IfcSectionedSpine | SpineCurve=@IfcCompositeCurve CrossSections=@*
  CrossSectionPositions=@IfcAxis2Placement3D*
-: IfcShapeAspect | ShapeRepresentations=@* Name=s Description=s ProductDefinitional=l
  PartOfProductDefinitionShape=@IfcProductDefinitionShape
IfcSolidModel: IfcSweptAreaSolid | SweptArea=@ Position=@IfcAxis2Placement3D
IfcSurface: IfcSweptSurface | SweptCurve=@ Position=@IfcAxis2Placement3D
`,
  },
  {
    of: ['IFC4'],
    entities: `
IfcCartesianPointList: IfcCartesianPointList2D | CoordList=r*2*
IfcCartesianPointList: IfcCartesianPointList3D | CoordList=r*3*
IfcSweptAreaSolid: IfcFixedReferenceSweptAreaSolid | Directrix=@ StartParam=r EndParam=r FixedReference=@IfcDirection
`,
  },
  {
    of: ['IFC4X3'],
    entities: `
IfcPlacement: IfcAxis2PlacementLinear | Axis=@IfcDirection RefDirection=@IfcDirection
IfcCartesianPointList: IfcCartesianPointList2D | CoordList=r*2* TagList=s*
IfcCartesianPointList: IfcCartesianPointList3D | CoordList=r*3* TagList=s*
IfcBoundedCurve: IfcCompositeCurve | Segments=@* SelfIntersect=l
IfcSegment: IfcCompositeCurveSegment | SameSense=b ParentCurve=@
IfcSegment: IfcCurveSegment | Placement=@ SegmentStart=? SegmentLength=? ParentCurve=@
IfcSweptAreaSolid: IfcDirectrixCurveSweptAreaSolid | Directrix=@ StartParam=? EndParam=?
IfcFixedReferenceSweptAreaSolid: IfcDirectrixDerivedReferenceSweptAreaSolid
IfcDirectrixCurveSweptAreaSolid: IfcFixedReferenceSweptAreaSolid | FixedReference=@IfcDirection
IfcObjectPlacement: IfcLinearPlacement | RelativePlacement=@IfcAxis2PlacementLinear
  CartesianPosition=@IfcAxis2Placement3D
IfcObjectPlacement: IfcLocalPlacement | RelativePlacement=?
-: IfcObjectPlacement | PlacementRelTo=@
IfcCurve: IfcOffsetCurve | BasisCurve=@
IfcOffsetCurve: IfcOffsetCurve2D | Distance=r SelfIntersect=l
IfcOffsetCurve: IfcOffsetCurve3D | Distance=r SelfIntersect=l RefDirection=@IfcDirection
IfcOffsetCurve: IfcOffsetCurveByDistances | OffsetValues=@IfcPointByDistanceExpression* Tag=s
IfcGeometricRepresentationItem: IfcPlacement | Location=@
IfcPoint: IfcPointByDistanceExpression | DistanceAlong=? OffsetLateral=r OffsetVertical=r OffsetLongitudinal=r
  BasisCurve=@
IfcCurve: IfcPolynomialCurve | Position=@ CoefficientsX=r* CoefficientsY=r* CoefficientsZ=r*
IfcSolidModel: IfcSectionedSolid | Directrix=@ CrossSections=@IfcProfileDef*
IfcSectionedSolid: IfcSectionedSolidHorizontal | CrossSectionPositions=@IfcAxis2PlacementLinear*
IfcGeometricRepresentationItem: IfcSegment | Transition=e
IfcDirectrixCurveSweptAreaSolid: IfcSurfaceCurveSweptAreaSolid | ReferenceSurface=@
IfcTriangulatedFaceSet: IfcTriangulatedIrregularNetwork | Flags=i*
`,
  },
];
