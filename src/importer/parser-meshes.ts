import type { IfcAPI } from 'web-ifc';
import type { Vec3 } from '../domain/vector.ts';
import type { BodyMeshes } from './body-meshes.ts';
import type { Polygon } from './geometry/mesh.ts';

/** The parser copies the file and builds its own tables beside it, within 4 GiB: it is not asked for more than this. */
const LARGEST = 2 ** 29;

/** Facets of a full circle: chords that lie within half a hundredth of the radius. */
const CIRCLE_SEGMENTS = 32;

const SILENT = 6;

/**
 * Meshes of the elements from web-ifc, which is loaded here only, since it takes most of a second and 130 MB. An element
 * that it cannot mesh has none; it never throws, as a body without a mesh is a finding and not a failure.
 */
export async function parserMeshes(bytes: Uint8Array, elements: Iterable<number>): Promise<BodyMeshes> {
  const found = new Map<number, readonly Polygon[]>();
  const meshes: BodyMeshes = { of: (element) => found.get(element) ?? null };
  if (bytes.length > LARGEST) return meshes;
  const api = await loadedParser();
  if (api === null) return meshes;
  let model = -1;
  try {
    model = api.OpenModel(bytes, { CIRCLE_SEGMENTS, COORDINATE_TO_ORIGIN: false });
    for (const element of elements) {
      const polygons = orNothing(() => meshOf(api, model, element));
      if (polygons !== null && polygons.length > 0) found.set(element, polygons);
    }
  } catch {
    // What it could not open it has said nothing sensible of: some of its exceptions are no errors at all.
  } finally {
    orNothing(() => {
      if (model >= 0) api.CloseModel(model);
      api.Dispose();
    });
  }
  return meshes;
}

async function loadedParser(): Promise<IfcAPI | null> {
  try {
    const { IfcAPI } = await import('web-ifc');
    const api = new IfcAPI();
    await api.Init();
    api.SetLogLevel(SILENT);
    return api;
  } catch {
    return null;
  }
}

function orNothing<T>(act: () => T): T | null {
  try {
    return act();
  } catch {
    return null;
  }
}

function meshOf(api: IfcAPI, model: number, element: number): Polygon[] {
  const polygons: Polygon[] = [];
  const { geometries } = api.GetFlatMesh(model, element);
  for (let i = 0; i < geometries.size(); i++) {
    const { geometryExpressID, flatTransformation } = geometries.get(i);
    const geometry = api.GetGeometry(model, geometryExpressID);
    try {
      const vertices = api.GetVertexArray(geometry.GetVertexData(), geometry.GetVertexDataSize());
      const indices = api.GetIndexArray(geometry.GetIndexData(), geometry.GetIndexDataSize());
      const corner = (index: number) => inWorld(vertices, index * FLOATS_A_VERTEX, flatTransformation);
      for (let k = 0; k + 2 < indices.length; k += 3) {
        polygons.push([[corner(indices[k]!), corner(indices[k + 1]!), corner(indices[k + 2]!)]]);
      }
    } finally {
      geometry.delete();
    }
  }
  return polygons;
}

/** Place and normal. */
const FLOATS_A_VERTEX = 6;

/** Column-major 4 x 4; the parser has y upright and z towards the viewer. */
function inWorld(vertices: Float32Array, at: number, m: readonly number[]): Vec3 {
  const [x, y, z] = [vertices[at]!, vertices[at + 1]!, vertices[at + 2]!];
  const row = (i: number) => m[i]! * x + m[4 + i]! * y + m[8 + i]! * z + m[12 + i]!;
  return [row(0), -row(2), row(1)];
}
