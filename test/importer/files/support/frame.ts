import { stepText } from '../../support/model-text.ts';

/**
 * One little frame in three writings: an I-beam drawn by Axis and Body in an assembly on a storey, and a round hollow brace
 * turned in its placement. Written by hand, so that the readers are not checked against a writer of ours.
 */

const PRODUCTS = (beamEnd: string, typeEnd: string, material: string) => `
#1=IFCPROJECT('0aaaaaaaaaaaaaaaaaaaaa',$,'Shed & yard',$,$,$,$,(#10),#2);
#2=IFCUNITASSIGNMENT((#3,#4));
#3=IFCSIUNIT(*,.LENGTHUNIT.,.MILLI.,.METRE.);
#4=IFCSIUNIT(*,.PLANEANGLEUNIT.,$,.RADIAN.);
#10=IFCGEOMETRICREPRESENTATIONCONTEXT($,'Model',3,1.E-5,#11,$);
#11=IFCAXIS2PLACEMENT3D(#12,$,$);
#12=IFCCARTESIANPOINT((0.,0.,0.));
#13=IFCLOCALPLACEMENT($,#11);
#14=IFCDIRECTION((0.,0.,1.));
#20=IFCBUILDINGSTOREY('0storeyaaaaaaaaaaaaaaa',$,'Eaves',$,$,#13,$,$,.ELEMENT.,3500.);
#21=IFCRELCONTAINEDINSPATIALSTRUCTURE('0contaiaaaaaaaaaaaaaaa',$,$,$,(#40,#60),#20);
#22=IFCELEMENTASSEMBLY('0assemblyaaaaaaaaaaaaa',$,'Truss 1',$,$,#13,$,$,$,.TRUSS.);
#23=IFCRELAGGREGATES('0aggregaaaaaaaaaaaaaaa',$,$,$,#22,(#40));
#30=IFCMATERIAL(${material});
#31=IFCRELASSOCIATESMATERIAL('0relmataaaaaaaaaaaaaaa',$,$,$,(#40,#60),#30);
#32=IFCPROPERTYSET('0psetaaaaaaaaaaaaaaaaa',$,'Delivery',$,(#33,#34));
#33=IFCPROPERTYSINGLEVALUE('Lot',$,IFCLABEL('A'),$);
#34=IFCPROPERTYSINGLEVALUE('Painted',$,IFCBOOLEAN(.T.),$);
#35=IFCRELDEFINESBYPROPERTIES('0defpropaaaaaaaaaaaaaa',$,$,$,(#40),#32);
#36=IFCBEAMTYPE('0beamtypeaaaaaaaaaaaaa',$,'IPE 200',$,$,$,$,$,$,${typeEnd});
#37=IFCRELDEFINESBYTYPE('0deftypeaaaaaaaaaaaaaa',$,$,$,(#40),#36);
#40=IFCBEAM('0beamaaaaaaaaaaaaaaaaa',$,'Chord \\X2\\00E4\\X0\\',$,$,#41,#44,'C1'${beamEnd});
#41=IFCLOCALPLACEMENT(#13,#42);
#42=IFCAXIS2PLACEMENT3D(#43,#14,$);
#43=IFCCARTESIANPOINT((1000.,2000.,3500.));
#44=IFCPRODUCTDEFINITIONSHAPE($,$,(#45,#50));
#45=IFCSHAPEREPRESENTATION(#10,'Axis','Curve3D',(#46));
#46=IFCPOLYLINE((#12,#47));
#47=IFCCARTESIANPOINT((6000.,0.,0.));
#50=IFCSHAPEREPRESENTATION(#10,'Body','SweptSolid',(#51));
#51=IFCEXTRUDEDAREASOLID(#52,#53,#14,6000.);
#52=IFCISHAPEPROFILEDEF(.AREA.,'IPE 200',$,100.,200.,5.6,8.5,12.PROFILEEND);
#53=IFCAXIS2PLACEMENT3D(#12,#54,#55);
#54=IFCDIRECTION((1.,0.,0.));
#55=IFCDIRECTION((0.,1.,0.));
#60=IFCMEMBER('0braceaaaaaaaaaaaaaaaa',$,'Brace',$,$,#61,#64,'B1'${beamEnd.replace('BEAM', 'BRACE')});
#61=IFCLOCALPLACEMENT(#13,#62);
#62=IFCAXIS2PLACEMENT3D(#63,#56,#55);
#63=IFCCARTESIANPOINT((1000.,2000.,0.5));
#56=IFCDIRECTION((0.6,0.,0.8));
#64=IFCPRODUCTDEFINITIONSHAPE($,$,(#65));
#65=IFCSHAPEREPRESENTATION(#10,'Body','SweptSolid',(#66));
#66=IFCEXTRUDEDAREASOLID(#67,$,#14,4250.25);
#67=IFCCIRCLEHOLLOWPROFILEDEF(.AREA.,'CHS 88.9x4',$,44.45,4.);`;

export const FRAME_IFC4_STEP = stepText(
  PRODUCTS(',.BEAM.', '.BEAM.', "'S355',$,$").replace('PROFILEEND', ',$,$'),
  'IFC4',
);
export const FRAME_IFC2X3_STEP = stepText(PRODUCTS('', '.BEAM.', "'S355'").replace('PROFILEEND', ''), 'IFC2X3');

const rooted = (guid: string, name = '') => `<GlobalId>${guid}</GlobalId>${name === '' ? '' : `<Name>${name}</Name>`}`;
const to = (attribute: string, entity: string, id: number) =>
  `<${attribute}><${entity} xsi:nil="true" ref="i${id}"/></${attribute}>`;
const many = (attribute: string, items: readonly (readonly [string, number])[]) =>
  `<${attribute} ex:cType="set">${items.map(([entity, id], i) => `<${entity} ex:pos="${i}" xsi:nil="true" ref="i${id}"/>`).join('')}</${attribute}>`;
const measures = (attribute: string, entity: string, values: readonly string[]) =>
  `<${attribute} ex:cType="list">${values.map((value, i) => `<${entity} pos="${i}">${value}</${entity}>`).join('')}</${attribute}>`;
const point = (id: number, ...values: string[]) =>
  `<IfcCartesianPoint id="i${id}">${measures('Coordinates', 'IfcLengthMeasure', values)}</IfcCartesianPoint>`;
const direction = (id: number, ...values: string[]) =>
  `<IfcDirection id="i${id}">${measures('DirectionRatios', 'ex:double-wrapper', values)}</IfcDirection>`;
const placement3D = (id: number, location: number, axis: number | null, reference: number | null) =>
  `<IfcAxis2Placement3D id="i${id}">${to('Location', 'IfcCartesianPoint', location)}` +
  `${axis === null ? '' : to('Axis', 'IfcDirection', axis)}${reference === null ? '' : to('RefDirection', 'IfcDirection', reference)}</IfcAxis2Placement3D>`;
const local = (id: number, parent: number | null, relative: number) =>
  `<IfcLocalPlacement id="i${id}">${parent === null ? '' : to('PlacementRelTo', 'IfcLocalPlacement', parent)}${to('RelativePlacement', 'IfcAxis2Placement3D', relative)}</IfcLocalPlacement>`;
const element = (entity: string, id: number, guid: string, name: string, at: number, shape: number, tag: string) =>
  `<${entity} id="i${id}">${rooted(guid, name)}${to('ObjectPlacement', 'IfcLocalPlacement', at)}${to('Representation', 'IfcProductDefinitionShape', shape)}<Tag>${tag}</Tag></${entity}>`;
const shape = (id: number, parts: readonly number[]) =>
  `<IfcProductDefinitionShape id="i${id}"><Representations ex:cType="list">${parts.map((part) => `<IfcShapeRepresentation xsi:nil="true" ref="i${part}"/>`).join('')}</Representations></IfcProductDefinitionShape>`;
const representation = (id: number, name: string, kind: string, item: readonly [string, number]) =>
  `<IfcShapeRepresentation id="i${id}">${to('ContextOfItems', 'IfcGeometricRepresentationContext', 10)}<RepresentationIdentifier>${name}</RepresentationIdentifier><RepresentationType>${kind}</RepresentationType>${many('Items', [item])}</IfcShapeRepresentation>`;

/** Every attribute an element, every instance at the top, references by `ref`. */
export const FRAME_IFC2X3_XML = `<?xml version="1.0" encoding="UTF-8"?>
<ex:iso_10303_28 xmlns:ex="urn:iso.org:standard:10303:part(28):version(2):xmlschema:common" xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance" xmlns="http://www.iai-tech.org/ifcXML/IFC2x3/FINAL" version="2.0">
<ex:iso_10303_28_header><ex:name>frame</ex:name><ex:time_stamp>2024-05-06T07:08:09</ex:time_stamp><ex:author>nobody</ex:author></ex:iso_10303_28_header>
<uos id="uos_1" description="" configuration="i-ifc2x3" edo="" xmlns="http://www.iai-tech.org/ifcXML/IFC2x3/FINAL">
<!-- the braces' <IfcMember> comes last -->
<IfcProject id="i1">${rooted('0aaaaaaaaaaaaaaaaaaaaa', '<![CDATA[Shed & yard]]>')}${many('RepresentationContexts', [['IfcGeometricRepresentationContext', 10]])}${to('UnitsInContext', 'IfcUnitAssignment', 2)}</IfcProject>
<IfcUnitAssignment id="i2">${many('Units', [
  ['IfcSIUnit', 3],
  ['IfcSIUnit', 4],
])}</IfcUnitAssignment>
<IfcSIUnit id="i3"><UnitType>lengthunit</UnitType><Prefix>milli</Prefix><Name>metre</Name></IfcSIUnit>
<IfcSIUnit id="i4"><UnitType>planeangleunit</UnitType><Name>radian</Name></IfcSIUnit>
<IfcGeometricRepresentationContext id="i10"><ContextType>Model</ContextType><CoordinateSpaceDimension>3</CoordinateSpaceDimension><Precision>1.0E-005</Precision>${to('WorldCoordinateSystem', 'IfcAxis2Placement3D', 11)}</IfcGeometricRepresentationContext>
${placement3D(11, 12, null, null)}${point(12, '0.', '0.', '0.')}${local(13, null, 11)}${direction(14, '0', '0', '1')}
<IfcBuildingStorey id="i20">${rooted('0storeyaaaaaaaaaaaaaaa', 'Eaves')}${to('ObjectPlacement', 'IfcLocalPlacement', 13)}<CompositionType>element</CompositionType><Elevation>3500.</Elevation></IfcBuildingStorey>
<IfcRelContainedInSpatialStructure id="i21">${rooted('0contaiaaaaaaaaaaaaaaa')}${many('RelatedElements', [
  ['IfcBeam', 40],
  ['IfcMember', 60],
])}${to('RelatingStructure', 'IfcBuildingStorey', 20)}</IfcRelContainedInSpatialStructure>
<IfcElementAssembly id="i22">${rooted('0assemblyaaaaaaaaaaaaa', 'Truss 1')}${to('ObjectPlacement', 'IfcLocalPlacement', 13)}<PredefinedType>truss</PredefinedType></IfcElementAssembly>
<IfcRelAggregates id="i23">${rooted('0aggregaaaaaaaaaaaaaaa')}${to('RelatingObject', 'IfcElementAssembly', 22)}${many('RelatedObjects', [['IfcBeam', 40]])}</IfcRelAggregates>
<IfcMaterial id="i30"><Name>S355</Name></IfcMaterial>
<IfcRelAssociatesMaterial id="i31">${rooted('0relmataaaaaaaaaaaaaaa')}${many('RelatedObjects', [
  ['IfcBeam', 40],
  ['IfcMember', 60],
])}${to('RelatingMaterial', 'IfcMaterial', 30)}</IfcRelAssociatesMaterial>
<IfcPropertySet id="i32">${rooted('0psetaaaaaaaaaaaaaaaaa', 'Delivery')}<HasProperties ex:cType="set"><IfcPropertySingleValue id="i33"><Name>Lot</Name><NominalValue><IfcLabel>A</IfcLabel></NominalValue></IfcPropertySingleValue><IfcPropertySingleValue id="i34"><Name>Painted</Name><NominalValue><IfcBoolean>true</IfcBoolean></NominalValue></IfcPropertySingleValue></HasProperties></IfcPropertySet>
<IfcRelDefinesByProperties id="i35">${rooted('0defpropaaaaaaaaaaaaaa')}${many('RelatedObjects', [['IfcBeam', 40]])}${to('RelatingPropertyDefinition', 'IfcPropertySet', 32)}</IfcRelDefinesByProperties>
<IfcBeamType id="i36">${rooted('0beamtypeaaaaaaaaaaaaa', 'IPE 200')}<PredefinedType>beam</PredefinedType></IfcBeamType>
<IfcRelDefinesByType id="i37">${rooted('0deftypeaaaaaaaaaaaaaa')}${many('RelatedObjects', [['IfcBeam', 40]])}${to('RelatingType', 'IfcBeamType', 36)}</IfcRelDefinesByType>
${element('IfcBeam', 40, '0beamaaaaaaaaaaaaaaaaa', 'Chord &#xE4;', 41, 44, 'C1')}
${local(41, 13, 42)}${placement3D(42, 43, 14, null)}${point(43, '1000.', '2000.', '3500.')}${shape(44, [45, 50])}
${representation(45, 'Axis', 'Curve3D', ['IfcPolyline', 46])}
<IfcPolyline id="i46"><Points ex:cType="list"><IfcCartesianPoint pos="1" xsi:nil="true" ref="i47"/><IfcCartesianPoint pos="0" xsi:nil="true" ref="i12"/></Points></IfcPolyline>
${point(47, '6.E3', '0.', '0.')}${representation(50, 'Body', 'SweptSolid', ['IfcExtrudedAreaSolid', 51])}
<IfcExtrudedAreaSolid id="i51">${to('SweptArea', 'IfcIShapeProfileDef', 52)}${to('Position', 'IfcAxis2Placement3D', 53)}${to('ExtrudedDirection', 'IfcDirection', 14)}<Depth>6000.</Depth></IfcExtrudedAreaSolid>
<IfcIShapeProfileDef id="i52"><ProfileType>area</ProfileType><ProfileName>IPE 200</ProfileName><OverallWidth>100.</OverallWidth><OverallDepth>200.</OverallDepth><WebThickness>5.6</WebThickness><FlangeThickness>8.5</FlangeThickness><FilletRadius>12.</FilletRadius></IfcIShapeProfileDef>
${placement3D(53, 12, 54, 55)}${direction(54, '1', '0', '0')}${direction(55, '0', '1', '0')}
${element('IfcMember', 60, '0braceaaaaaaaaaaaaaaaa', 'Brace', 61, 64, 'B1')}
${local(61, 13, 62)}${placement3D(62, 63, 56, 55)}${point(63, '1000.', '2000.', '0.5')}${direction(56, '0.6', '0', '0.8')}
${shape(64, [65])}${representation(65, 'Body', 'SweptSolid', ['IfcExtrudedAreaSolid', 66])}
<IfcExtrudedAreaSolid id="i66">${to('SweptArea', 'IfcCircleHollowProfileDef', 67)}${to('ExtrudedDirection', 'IfcDirection', 14)}<Depth>4250.25</Depth></IfcExtrudedAreaSolid>
<IfcCircleHollowProfileDef id="i67"><ProfileType>area</ProfileType><ProfileName>CHS 88.9x4</ProfileName><Radius>44.45</Radius><WallThickness>4.</WallThickness></IfcCircleHollowProfileDef>
</uos>
</ex:iso_10303_28>
`;

/** Simple values as XML attributes, instances inside one another, relationships under inverse attributes. */
export const FRAME_IFC4_XML = `<?xml version="1.0" encoding="UTF-8"?>
<ifc:ifcXML xmlns:ifc="http://www.buildingsmart-tech.org/ifcXML/IFC4/Add2" xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance" xmlns="http://www.buildingsmart-tech.org/ifcXML/IFC4/Add2" id="frame" express="http://www.buildingsmart-tech.org/ifc/IFC4/Add2/IFC4.exp">
<header><name>frame</name><time_stamp>2024-05-06T07:08:09</time_stamp><author>nobody</author></header>
<IfcProject id="i1" GlobalId="0aaaaaaaaaaaaaaaaaaaaa" Name="Shed &amp; yard">
  <IsDecomposedBy><IfcRelAggregates GlobalId="0rootaaaaaaaaaaaaaaaaa"><RelatedObjects>
    <IfcBuildingStorey id="i20" GlobalId="0storeyaaaaaaaaaaaaaaa" Name="Eaves" CompositionType="element" Elevation="3500.">
      <ObjectPlacement xsi:type="IfcLocalPlacement" id="i13"><RelativePlacement><IfcAxis2Placement3D id="i11"><Location id="i12" Coordinates="0 0 0"/></IfcAxis2Placement3D></RelativePlacement></ObjectPlacement>
      <ContainsElements><IfcRelContainedInSpatialStructure GlobalId="0contaiaaaaaaaaaaaaaaa"><RelatedElements>
        <IfcBeam xsi:nil="true" href="i40"/>
        <IfcMember id="i60" GlobalId="0braceaaaaaaaaaaaaaaaa" Name="Brace" Tag="B1" PredefinedType="brace">
          <HasAssociations><IfcRelAssociatesMaterial xsi:nil="true" href="i31"/></HasAssociations>
          <ObjectPlacement xsi:type="IfcLocalPlacement"><PlacementRelTo xsi:type="ifc:IfcLocalPlacement" xsi:nil="true" ref="i13"/><RelativePlacement><IfcAxis2Placement3D><Location Coordinates="1000 2000 5e-1"/><Axis DirectionRatios="0.6 0 0.8"/><RefDirection DirectionRatios="0 1 0"/></IfcAxis2Placement3D></RelativePlacement></ObjectPlacement>
          <Representation xsi:type="IfcProductDefinitionShape"><Representations><IfcShapeRepresentation RepresentationIdentifier="Body" RepresentationType="SweptSolid"><ContextOfItems xsi:type="IfcGeometricRepresentationContext" xsi:nil="true" href="i10"/><Items>
            <IfcExtrudedAreaSolid Depth="4250.25"><SweptArea xsi:type="IfcCircleHollowProfileDef" ProfileType="area" ProfileName="CHS 88.9x4" Radius="44.45" WallThickness="4"/><ExtrudedDirection xsi:nil="true" href="i14"/></IfcExtrudedAreaSolid>
          </Items></IfcShapeRepresentation></Representations></Representation>
        </IfcMember>
      </RelatedElements></IfcRelContainedInSpatialStructure></ContainsElements>
    </IfcBuildingStorey>
  </RelatedObjects></IfcRelAggregates></IsDecomposedBy>
  <RepresentationContexts><IfcGeometricRepresentationContext id="i10" ContextType="Model" CoordinateSpaceDimension="3" Precision="1E-05"><WorldCoordinateSystem><IfcAxis2Placement3D xsi:nil="true" href="i11"/></WorldCoordinateSystem></IfcGeometricRepresentationContext></RepresentationContexts>
  <UnitsInContext><Units><IfcSIUnit UnitType="lengthunit" Prefix="milli" Name="metre"/><IfcSIUnit UnitType="planeangleunit" Name="radian"/></Units></UnitsInContext>
</IfcProject>
<IfcElementAssembly GlobalId="0assemblyaaaaaaaaaaaaa" Name="Truss 1" PredefinedType="truss">
  <ObjectPlacement xsi:type="IfcLocalPlacement" xsi:nil="true" href="i13"/>
  <IsDecomposedBy><IfcRelAggregates GlobalId="0aggregaaaaaaaaaaaaaaa"><RelatedObjects>
    <IfcBeam id="i40" GlobalId="0beamaaaaaaaaaaaaaaaaa" Name="Chord &#228;" Tag="C1" PredefinedType="beam">
      <IsTypedBy GlobalId="0deftypeaaaaaaaaaaaaaa"><RelatingType xsi:type="IfcBeamType" GlobalId="0beamtypeaaaaaaaaaaaaa" Name="IPE 200" PredefinedType="beam"/></IsTypedBy>
      <IsDefinedBy><IfcRelDefinesByProperties GlobalId="0defpropaaaaaaaaaaaaaa"><RelatingPropertyDefinition><IfcPropertySet GlobalId="0psetaaaaaaaaaaaaaaaaa" Name="Delivery"><HasProperties>
        <IfcPropertySingleValue Name="Lot"><NominalValue><IfcLabel-wrapper>A</IfcLabel-wrapper></NominalValue></IfcPropertySingleValue>
        <IfcPropertySingleValue Name="Painted"><NominalValue><IfcBoolean-wrapper>true</IfcBoolean-wrapper></NominalValue></IfcPropertySingleValue>
      </HasProperties></IfcPropertySet></RelatingPropertyDefinition></IfcRelDefinesByProperties></IsDefinedBy>
      <HasAssociations><IfcRelAssociatesMaterial id="i31" GlobalId="0relmataaaaaaaaaaaaaaa"><RelatingMaterial xsi:type="IfcMaterial" Name="S355"/></IfcRelAssociatesMaterial></HasAssociations>
      <ObjectPlacement xsi:type="IfcLocalPlacement"><PlacementRelTo xsi:type="IfcLocalPlacement" xsi:nil="true" href="i13"/><RelativePlacement><IfcAxis2Placement3D><Location Coordinates="1000 2000 3500"/><Axis xsi:nil="true" href="i14"/></IfcAxis2Placement3D></RelativePlacement></ObjectPlacement>
      <Representation xsi:type="IfcProductDefinitionShape"><Representations>
        <IfcShapeRepresentation RepresentationIdentifier="Axis" RepresentationType="Curve3D"><ContextOfItems xsi:type="IfcGeometricRepresentationContext" xsi:nil="true" href="i10"/><Items><IfcPolyline><Points><IfcCartesianPoint xsi:nil="true" href="i12"/><IfcCartesianPoint Coordinates="6000.0 0 0"/></Points></IfcPolyline></Items></IfcShapeRepresentation>
        <IfcShapeRepresentation RepresentationIdentifier="Body" RepresentationType="SweptSolid"><ContextOfItems xsi:type="IfcGeometricRepresentationContext" xsi:nil="true" href="i10"/><Items>
          <IfcExtrudedAreaSolid Depth="6000"><SweptArea xsi:type="IfcIShapeProfileDef" ProfileType="area" ProfileName="IPE 200" OverallWidth="100" OverallDepth="200" WebThickness="5.6" FlangeThickness="8.5" FilletRadius="12"/><Position><Location xsi:nil="true" href="i12"/><Axis DirectionRatios="1 0 0"/><RefDirection DirectionRatios="0 1 0"/></Position><ExtrudedDirection id="i14" DirectionRatios="0 0 1"/></IfcExtrudedAreaSolid>
        </Items></IfcShapeRepresentation>
      </Representations></Representation>
    </IfcBeam>
  </RelatedObjects></IfcRelAggregates></IsDecomposedBy>
</IfcElementAssembly>
</ifc:ifcXML>
`;
