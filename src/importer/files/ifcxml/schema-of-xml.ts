import { ModelError } from '../../../domain/errors.ts';
import { knownSchema } from '../../schema.ts';
import type { XmlElement } from './xml-element.ts';

/**
 * The schema that the attributes of the outer elements name, as FILE_SCHEMA writes it. There is no one place for it: it
 * stands in namespaces, schema locations and configurations (`.../ifcXML/IFC2x3/FINAL`, `.../IFC/RELEASE/IFC4/ADD2_TC1`).
 * Throws ModelError where they name none, or one that is not read.
 */
export function schemaOfXml(outer: readonly XmlElement[]): string {
  for (const value of outer.flatMap(({ attributeValues }) => attributeValues)) {
    const match = /IFC(2X\d?|4[X_/]\d|4|5)(?![0-9])[_/]?(RC\d*|ALPHA|BETA)?/i.exec(value);
    if (match === null) continue;
    const name = `IFC${match[1]!.toUpperCase().replace(/[_/]/, 'X')}`;
    const schema = match[2] === undefined ? name : `${name}_${match[2].toUpperCase()}`;
    knownSchema(schema);
    return schema;
  }
  throw new ModelError(
    'The ifcXML does not say which schema it follows. Export it again as IFC4, or as STEP text (.ifc).',
  );
}
