import { IFCRELDEFINESBYPROPERTIES, IfcAPI } from 'web-ifc';

/** A value of a property as an independent parser reads it: alone, in a list, or a table as pairs. */
export type ReadValue = number | string | readonly (number | string)[] | readonly (readonly [string, number])[];

interface Value {
  readonly value: number | string;
}

/** By GlobalId of the object and name of the set, every property that stands in a set of ours. */
export async function readSets(bytes: Uint8Array): Promise<Map<string, Map<string, ReadValue>>> {
  const api = new IfcAPI();
  await api.Init();
  api.SetLogLevel(6);
  const id = api.OpenModel(bytes);
  const found = new Map<string, Map<string, ReadValue>>();
  const line = (ref: { readonly value: number }) => api.GetLine(id, ref.value);
  const relations = api.GetLineIDsWithType(id, IFCRELDEFINESBYPROPERTIES);
  for (let k = 0; k < relations.size(); k++) {
    const { RelatedObjects, RelatingPropertyDefinition } = api.GetLine(id, relations.get(k));
    const set = line([RelatingPropertyDefinition].flat()[0]);
    if (!String(set?.Name?.value).startsWith('Pinwright_')) continue;
    const properties = (set.HasProperties ?? set.Quantities)
      .map(line)
      .map((property: Record<string, unknown>): [string, ReadValue] => [
        String((property.Name as Value).value),
        readValue(property),
      ]);
    for (const object of RelatedObjects) {
      found.set(`${line(object).GlobalId.value} ${set.Name.value}`, new Map<string, ReadValue>(properties));
    }
  }
  api.CloseModel(id);
  api.Dispose();
  return found;
}

function readValue(property: Record<string, unknown>): ReadValue {
  const list = (values: unknown) => (values as Value[]).map(({ value }) => value);
  if (property.DefiningValues) {
    const numbers = list(property.DefinedValues) as number[];
    return list(property.DefiningValues).map((label, k): [string, number] => [String(label), numbers[k]!]);
  }
  if (property.ListValues) return list(property.ListValues);
  return ((property.NominalValue ?? property.LengthValue) as Value).value;
}
