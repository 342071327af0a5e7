import { describe, expect, it } from 'vitest';
import { importModel } from '../../../src/importer/import-model.ts';
import { openStep } from '../../../src/step/step-file.ts';
import { beamWith, stepText } from '../support/model-text.ts';

/** One beam of 3 m extruded from profile #100. */
const beamOf = (profile: string, schema = 'IFC4') => {
  const more = `#100=${profile};\n#101=IFCEXTRUDEDAREASOLID(#100,$,#13,3000.);`;
  return importModel(openStep(new TextEncoder().encode(stepText(beamWith({ body: '#101', more }), schema))));
};

const told = async (profile: string, schema?: string) => {
  const { members, findings } = await beamOf(profile, schema);
  const sentences = findings.filter(({ code }) => code === 'section-disagrees' || code === 'no-section');
  return { section: members[0]?.section ?? null, sentences: sentences.map(({ message }) => message) };
};

describe('a profile whose dimensions are impossible', () => {
  it.each([
    ["IFCCIRCLEHOLLOWPROFILEDEF(.AREA.,'Rohr 7',$,50.,60.)", ['Rohr 7', 'wall 60 mm', 'radius 50 mm']],
    ["IFCISHAPEPROFILEDEF(.AREA.,'Trager 1',$,100.,200.,120.,10.,5.,$,$)", ['Trager 1', 'web 120 mm', 'flange 100 mm']],
    [
      "IFCISHAPEPROFILEDEF(.AREA.,'Trager 2',$,100.,200.,8.,100.,5.,$,$)",
      ['Trager 2', 'flange 100 mm', 'depth 200 mm'],
    ],
    ["IFCRECTANGLEPROFILEDEF(.AREA.,'Flach 3',$,100.,0.)", ['Flach 3', 'depth is 0 mm']],
    ["IFCRECTANGLEHOLLOWPROFILEDEF(.AREA.,'Kasten',$,60.,80.,30.,$,$)", ['Kasten', 'wall 30 mm', 'width 60 mm']],
    ["IFCLSHAPEPROFILEDEF(.AREA.,'Winkel',$,60.,60.,60.,$,$,$)", ['Winkel', 'thickness 60 mm']],
    ["IFCUSHAPEPROFILEDEF(.AREA.,'Rinne',$,100.,50.,6.,50.,$,$,$)", ['Rinne', 'flange 50 mm', 'depth 100 mm']],
    ["IFCTSHAPEPROFILEDEF(.AREA.,'Tee',$,60.,60.,70.,7.,$,$,$,$,$)", ['Tee', 'web 70 mm', 'flange 60 mm']],
  ])('%s is named with its numbers, whatever the section then is', async (profile, words) => {
    const { sentences } = await told(profile);
    expect(sentences).toHaveLength(1);
    for (const word of words) expect(sentences[0]).toContain(word);
  });

  it('but is called by a designation takes the section of that name, and says so', async () => {
    const { section, sentences } = await told("IFCISHAPEPROFILEDEF(.AREA.,'HEA 200',$,200.,190.,0.,10.,18.,$,$)");
    // 53.83 cm2 in the manufacturers' tables.
    expect(section).toMatchObject({ name: 'HEA 200', from: 'name' });
    expect(section!.area).toBeCloseTo(53.83e-4, 6);
    expect(sentences).toHaveLength(1);
    for (const word of ['HEA 200', 'web thickness is 0 mm']) expect(sentences[0]).toContain(word);
  });
});

describe('a profile that is called by a designation', () => {
  it.each([
    ['of a larger section', "IFCISHAPEPROFILEDEF(.AREA.,'HEA 200',$,200.,190.,9.,14.,18.,$,$)", /HEA 200.*1\d\d %/],
    ['drawn in the wrong unit', "IFCISHAPEPROFILEDEF(.AREA.,'HEA 200',$,20.,19.,0.65,1.,1.8,$,$)", /HEA 200.*% of the/],
    ['of another shape', "IFCRECTANGLEPROFILEDEF(.AREA.,'CHS 114.3x5',$,114.3,114.3)", /CHS 114\.3x5/],
    ['with a thinner wall', "IFCCIRCLEHOLLOWPROFILEDEF(.AREA.,'CHS 114.3x6.3',$,57.15,5.)", /CHS 114\.3x6\.3.*8\d %/],
  ])('and has the dimensions %s is said to disagree; the dimensions are taken', async (_, profile, sentence) => {
    const { section, sentences } = await told(profile);
    expect(sentences).toHaveLength(1);
    expect(sentences[0]).toMatch(sentence);
    expect(section!.from).toBe('profile');
  });

  it.each([
    ['as tabled', "IFCISHAPEPROFILEDEF(.AREA.,'HEA 200',$,200.,190.,6.5,10.,18.,$,$)"],
    ['with the fillets left out', "IFCISHAPEPROFILEDEF(.AREA.,'HEA 100',$,100.,96.,5.,8.,$,$,$)"],
    ['lying on its side', "IFCLSHAPEPROFILEDEF(.AREA.,'L 100x50x8',$,50.,100.,8.,8.,$,$)"],
    ['with sharp corners', "IFCRECTANGLEHOLLOWPROFILEDEF(.AREA.,'SHS 60x60x5',$,60.,60.,5.,$,$)"],
    ['that is no designation', "IFCRECTANGLEPROFILEDEF(.AREA.,'Flat A',$,60.,60.)"],
    ['that is a mere number of its own', "IFCRECTANGLEPROFILEDEF(.AREA.,'T 100',$,60.,60.)"],
  ])('and has its dimensions %s is not said to disagree', async (_, profile) => {
    expect((await told(profile)).sentences).toEqual([]);
  });
});
