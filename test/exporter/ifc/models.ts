export const PROJECT = '0aaaaaaaaaaaaaaaaaaaaa';
export const BEAM = '0bbbbbbbbbbbbbbbbbbbbb';
export const COLUMN = '0ccccccccccccccccccccc';

/** A small valid model: a project, a beam (#10) and a column (#11), both without shape. */
export function model(schema: 'IFC2X3' | 'IFC4' | 'IFC4X3_ADD2'): string {
  const last = schema === 'IFC2X3' ? '$' : '$,$';
  return `ISO-10303-21;
HEADER;
FILE_DESCRIPTION(('a small frame'),'2;1');
FILE_NAME('frame.ifc','2025-01-01T12:00:00',('A. Modeller'),('An office'),'','','');
FILE_SCHEMA(('${schema}'));
ENDSEC;
DATA;
#1=IFCPROJECT('${PROJECT}',#5,'Frame; it''s /* small */',$,$,$,$,(#7),#8);
#2=IFCPERSON($,'Modeller',$,$,$,$,$,$);
#3=IFCORGANIZATION($,'An office',$,$,$);
#4=IFCPERSONANDORGANIZATION(#2,#3,$);
#5=IFCOWNERHISTORY(#4,#6,$,.NOCHANGE.,$,$,$,1735732800);
#6=IFCAPPLICATION(#3,'1','A modeller','modeller');
#7=IFCGEOMETRICREPRESENTATIONCONTEXT($,'Model',3,1.E-05,#13,$);
#8=IFCUNITASSIGNMENT((#9));
#9=IFCSIUNIT(*,.LENGTHUNIT.,.MILLI.,.METRE.);
#10=IFCBEAM('${BEAM}',#5,'Beam',$,$,$,$,${last});
#11=IFCCOLUMN('${COLUMN}',#5,'Column',$,$,$,$,${last});
#12=IFCCARTESIANPOINT((0.,0.,0.));
#13=IFCAXIS2PLACEMENT3D(#12,$,$);
ENDSEC;
END-ISO-10303-21;
`;
}
