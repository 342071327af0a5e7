import { describe, expect, test } from 'vitest';
import { openStep } from '../../src/step/step-file.ts';
import { StepRef } from '../../src/step/values.ts';
import { bytesOf, fileWith, HEAD, open, TAIL } from './support.ts';

describe('the header', () => {
  test('gives the schema in upper case, the time stamp and the other entries', () => {
    const file = openStep(bytesOf(fileWith('').replace("'IFC4'", "'ifc4x3_add2'")));
    expect(file.schema).toBe('IFC4X3_ADD2');
    expect(file.timeStamp).toBe('2026-03-01T09:00:00');
    expect(file.fileDescription).toEqual([['ViewDefinition [ReferenceView]'], '2;1']);
    expect(file.fileName[2]).toEqual(['A. Modeller']);
    expect(file.fileSchema).toEqual([['ifc4x3_add2']]);
  });

  test('may hold comments, () and $ where they do not belong, a byte order mark and lower-case keywords', () => {
    const text = `\xef\xbb\xbf/* made by; hand */ ISO-10303-21 ;
header;
/* name's */ FILE_NAME /* ; */ ( /* ' */ 'a',$,(),(),$,$,$);
file_schema (( 'IFC2X3' ));
endsec;
data;
#1=ifcwall('x');
endsec;
end-iso-10303-21;`;
    const file = openStep(bytesOf(text));
    expect([file.schema, file.timeStamp, file.size, file.typeOf(1)]).toEqual(['IFC2X3', null, 1, 'IFCWALL']);
  });

  test('names the schema also with an object identifier after it or without inner brackets', () => {
    expect(openStep(bytesOf(fileWith('').replace("('IFC4')", "('IFC4 { 1 0 10303 }')"))).schema).toBe('IFC4');
    expect(openStep(bytesOf(fileWith('').replace("('IFC4')", "'IFC4'"))).schema).toBe('IFC4');
  });

  test('without a schema gives an empty one', () => {
    expect(openStep(bytesOf(`ISO-10303-21;\nHEADER;\nENDSEC;\nDATA;\n${TAIL}`)).schema).toBe('');
    expect(openStep(bytesOf(`ISO-10303-21;\nDATA;\n${TAIL}`)).schema).toBe('');
  });
});

describe('the index', () => {
  test('finds instances by id and by type in file order', () => {
    const file = open("#7=IFCBEAM('a');\n#3=IFCCOLUMN('b');\n#5=IFCBEAM('c');");
    expect([file.size, file.maxId]).toEqual([3, 7]);
    expect([file.has(3), file.has(4), file.has(8), file.has(-1), file.has(2.5)]).toEqual([
      true,
      false,
      false,
      false,
      false,
    ]);
    expect([file.typeOf(7), file.typeOf(4)]).toEqual(['IFCBEAM', '']);
    expect(file.idsOf('IFCBEAM')).toEqual([7, 5]);
    expect(file.idsOf('IFCSLAB')).toEqual([]);
    expect([...file.types()]).toEqual(['IFCBEAM', 'IFCCOLUMN']);
    expect([...file.ids()]).toEqual([7, 3, 5]);
    expect(file.args(5)).toEqual(['c']);
    expect(file.args(4)).toEqual([]);
  });

  test('copes with ids far apart up to 2^32 - 1', () => {
    const file = open('#4294967295=IFCX(#1);\n#1=IFCX(1.);\n#2147483648=IFCX(2.);');
    expect(file.maxId).toBe(4294967295);
    expect(file.args(4294967295)).toEqual([new StepRef(1)]);
    expect(file.args(2147483648)).toEqual([2]);
    expect(file.has(4294967294)).toBe(false);
    expect(file.problems).toEqual([]);
  });

  test('keeps thousands of sparse ids apart', () => {
    const ids = Array.from({ length: 5000 }, (_, i) => i * 65_536 + 1);
    const file = open(ids.map((id) => `#${id}=IFCX(${id});`).join('\n'));
    for (const id of ids) expect(file.args(id)).toEqual([id]);
    expect(file.has(2)).toBe(false);
  });

  test('keeps thousands of types apart, two whose hashes are the same among them', () => {
    const types = ['KHHGQMZE', 'ZUWSKDGV', ...Array.from({ length: 5000 }, (_, i) => `IFCTYPE${i}`)];
    const file = open(types.map((type, i) => `#${i + 1}=${type}();`).join('\n'));
    expect(types.map((_, i) => file.typeOf(i + 1))).toEqual(types);
  });

  test('takes spaces, line ends and comments between all tokens', () => {
    const file = open("#1 \r\n= /* a ' ; */ IFCX /**/ ( /* # */ 'a' ,\n\t( 1. , #2 ) , .A. ) ;#2=IFCY();");
    expect(file.args(1)).toHaveLength(3);
    expect(file.args(2)).toEqual([]);
    expect(file.has(2)).toBe(true);
    expect(file.problems).toEqual([]);
  });

  test('is not misled by what stands in strings and comments', () => {
    const file = open(
      "#1=IFCX('it''s #2=IFCY(); /* ENDSEC; ');\n/* #3=IFCZ(1); ' \n ENDSEC; **/\n#4=IFCX('/*');\n#5=IFCX('*/');",
    );
    expect([...file.ids()]).toEqual([1, 4, 5]);
    expect(file.args(1)).toEqual(["it's #2=IFCY(); /* ENDSEC; "]);
  });

  test('reads carriage returns, no line ends at all, and no trailing line end', () => {
    for (const text of [
      fileWith('#1=IFCX(1);\n#2=IFCY(#1);').replaceAll('\n', '\r\n'),
      fileWith('#1=IFCX(1);\n#2=IFCY(#1);').replaceAll('\n', ''),
      fileWith('#1=IFCX(1);\n#2=IFCY(#1);').trimEnd(),
      `${HEAD}DATA;#1=IFCX(1);#2=IFCY(#1);ENDSEC`,
    ]) {
      const file = openStep(bytesOf(text));
      expect([file.size, file.args(2)]).toEqual([2, [new StepRef(1)]]);
    }
  });

  test('goes on over several DATA sections, named ones too, and points at the last ENDSEC', () => {
    const text = `${HEAD}DATA('a;b',('IFC4'));\n#1=IFCX(1);\nENDSEC;\nDATA;\n#2=IFCX(2);\n${TAIL}`;
    const file = openStep(bytesOf(text));
    expect([...file.ids()]).toEqual([1, 2]);
    expect(file.insertAt).toBe(text.lastIndexOf('ENDSEC'));
  });

  test('passes over anchors, references and signatures', () => {
    const text = `${HEAD}ANCHOR;\n<door>=#1;\nENDSEC;\nREFERENCE;\n#9=<a#b>;\nENDSEC;\nDATA;\n#1=IFCX(1);\n${TAIL}SIGNATURE\nMIIB/*x'==\nENDSEC;\n`;
    const file = openStep(bytesOf(text));
    expect([[...file.ids()], file.isSigned]).toEqual([[1], true]);
    expect(text.slice(file.insertAt)).toMatch(/^ENDSEC;\nEND-ISO/);
    expect(open('').isSigned).toBe(false);
  });

  test('does not mind what follows the end of the file proper', () => {
    expect(openStep(bytesOf(`${fileWith('#1=IFCX(1);')}\0\0'left over`)).size).toBe(1);
  });

  test('reads an instance of several types as its records and its parameters one after another', () => {
    const file = open("#1=( LENGTH_UNIT() NAMED_UNIT(*) SI_UNIT(.MILLI.,.METRE.) );\n#2=(IFCX('a'));");
    expect(file.typeOf(1)).toBe('LENGTH_UNIT+NAMED_UNIT+SI_UNIT');
    expect(file.args(1)).toHaveLength(3);
    expect(file.records(1).map((record) => [record.type, record.args.length])).toEqual([
      ['LENGTH_UNIT', 0],
      ['NAMED_UNIT', 1],
      ['SI_UNIT', 2],
    ]);
    expect([file.typeOf(2), file.args(2), file.idsOf('IFCX')]).toEqual(['IFCX', ['a'], [2]]);
  });

  test('reads bytes that begin inside a larger buffer', () => {
    const text = bytesOf(`junk${fileWith("#1=IFCX('abc');")}`);
    expect(openStep(text.subarray(4)).args(1)).toEqual(['abc']);
  });
});
