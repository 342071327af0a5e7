import { describe, expect, it, vi } from 'vitest';
import { openStep } from '../../../src/step/step-file.ts';
import { COMMON, stepText } from '../support/model-text.ts';
import { evidenceOf, evidenceOfFile, plateWith } from './evidence-of.ts';

const BEAMS = `${COMMON}
#30=IFCBEAM('0a',$,'A',$,$,#16,$,$);
#31=IFCBEAM('0b',$,'B',$,$,#16,$,$);
#32=IFCPLATE('0p',$,'P',$,$,#16,$,$);
#33=IFCMECHANICALFASTENER('0f',$,'F',$,$,#16,$,$,$,$);`;

describe('the relationships of a model', () => {
  for (const schema of ['IFC2X3', 'IFC4', 'IFC4X3_ADD2']) {
    it(`tell which elements are connected, and by what, in ${schema}`, () => {
      const { related } = evidenceOf(
        `${BEAMS}
#40=IFCRELCONNECTSELEMENTS('r1',$,$,$,$,#30,#32);
#41=IFCRELCONNECTSPATHELEMENTS('r2',$,$,$,$,#30,#31,(),(),.ATEND.,.ATSTART.);
#42=IFCRELCONNECTSWITHREALIZINGELEMENTS('r3',$,$,$,$,#31,#30,(#32,#33),'bolted');`,
        schema,
      );
      expect(related).toEqual([
        { a: '0a', b: '0p', by: 'IfcRelConnectsElements', realising: [] },
        { a: '0a', b: '0b', by: 'IfcRelConnectsPathElements', realising: [] },
        { a: '0b', b: '0a', by: 'IfcRelConnectsWithRealizingElements', realising: ['0p', '0f'] },
      ]);
    });
  }

  it('say nothing where an end of one is missing, or both ends are one element', () => {
    const { related } = evidenceOf(`${BEAMS}
#40=IFCRELCONNECTSELEMENTS('r1',$,$,$,$,#30,#99);
#41=IFCRELCONNECTSELEMENTS('r2',$,$,$,$,#30,#30);
#42=IFCRELCONNECTSELEMENTS('r3',$,$,$,$,$,#30);
#43=IFCRELCONNECTSWITHREALIZINGELEMENTS('r4',$,$,$,$,#31,#30,(#99),$);`);
    expect(related).toEqual([{ a: '0b', b: '0a', by: 'IfcRelConnectsWithRealizingElements', realising: [] }]);
  });
});

describe('the assemblies of a model', () => {
  it('are told apart by their GlobalIds where they share a name', () => {
    const { assemblies } = evidenceOf(`${BEAMS}
#60=IFCELEMENTASSEMBLY('0t',$,'Truss',$,$,#16,$,$,$,$);
#61=IFCELEMENTASSEMBLY('0u',$,'Truss',$,$,#16,$,$,$,$);
#70=IFCRELAGGREGATES('r1',$,$,$,#60,(#30));
#71=IFCRELAGGREGATES('r2',$,$,$,#61,(#31));`);
    expect(assemblies.get('0a')).toEqual({ globalId: '0t', name: 'Truss' });
    expect(assemblies.get('0b')).toEqual({ globalId: '0u', name: 'Truss' });
    expect(assemblies.has('0p')).toBe(false);
  });

  it('are the nearest ones where assemblies are made of assemblies, and none where the whole is of another class', () => {
    const { assemblies } = evidenceOf(`${BEAMS}
#60=IFCELEMENTASSEMBLY('0t',$,'Half',$,$,#16,$,$,$,$);
#61=IFCELEMENTASSEMBLY('0u',$,'',$,$,#16,$,$,$,$);
#62=IFCSTAIR('0s',$,'Stair',$,$,#16,$,$,$);
#70=IFCRELAGGREGATES('r1',$,$,$,#60,(#30));
#71=IFCRELAGGREGATES('r2',$,$,$,#61,(#60));
#72=IFCRELAGGREGATES('r3',$,$,$,#62,(#31));
#73=IFCRELNESTS('r4',$,$,$,#30,(#33));`);
    expect(assemblies.get('0a')?.globalId).toBe('0t');
    expect(assemblies.get('0t')).toEqual({ globalId: '0u', name: null });
    expect(assemblies.get('0f')?.globalId).toBe('0t');
    expect(assemblies.has('0b')).toBe(false);
  });
});

describe('evidence', () => {
  it('is not read before it is asked for, and then once', () => {
    const text = plateWith('#100', '#100=IFCEXTRUDEDAREASOLID(#20,$,#13,10.);');
    const file = openStep(new TextEncoder().encode(stepText(text)));
    const evidence = evidenceOfFile(file);
    const asked = vi.spyOn(file, 'idsOf');
    expect(asked).not.toHaveBeenCalled();
    const first = evidence.plates;
    const calls = asked.mock.calls.length;
    expect(calls).toBeGreaterThan(0);
    expect(evidence.plates).toBe(first);
    expect(evidence.unreadPlates).toEqual([]);
    expect(asked.mock.calls.length).toBe(calls);
  });
});
