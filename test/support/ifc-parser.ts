import { IfcAPI } from 'web-ifc';

/** What an independent parser finds in a file. */
export interface Reopened {
  readonly schema: string;
  /** Number of instances of each type asked for. */
  readonly count: (type: number) => number;
  /** One line as the parser reads it, references resolved to depth one. */
  readonly lines: (type: number) => Record<string, unknown>[];
}

/** Opens bytes with web-ifc, hands the model over and closes it. */
export async function reopened<T>(bytes: Uint8Array, look: (model: Reopened) => T): Promise<T> {
  const api = new IfcAPI();
  await api.Init();
  api.SetLogLevel(6);
  const id = api.OpenModel(bytes);
  try {
    const idsOf = (type: number) => {
      const found = api.GetLineIDsWithType(id, type);
      return Array.from({ length: found.size() }, (_, i) => found.get(i));
    };
    return look({
      schema: api.GetModelSchema(id),
      count: (type) => idsOf(type).length,
      lines: (type) => idsOf(type).map((line) => api.GetLine(id, line, true) as Record<string, unknown>),
    });
  } finally {
    api.CloseModel(id);
    api.Dispose();
  }
}
