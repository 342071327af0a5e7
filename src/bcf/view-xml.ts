import type { Vec3 } from '../domain/vector.ts';
import type { BcfVersion, TopicView } from './types.ts';
import { type XmlNode, xmlDocument } from './xml.ts';

/** A `.bcfv` file: elements selected and coloured, the camera, and the plane that cuts off what stands before them. */
export function viewXml(view: TopicView, version: BcfVersion): string {
  const { camera, clipping } = view;
  return xmlDocument({
    VisualizationInfo: {
      '@Guid': view.guid,
      Components: componentsXml(view, version),
      PerspectiveCamera: {
        CameraViewPoint: pointXml(camera.eye),
        CameraDirection: pointXml(camera.direction),
        CameraUpVector: pointXml(camera.up),
        FieldOfView: camera.fieldOfView,
        ...(version === '3.0' ? { AspectRatio: number(camera.aspect) } : {}),
      },
      ...(clipping === null
        ? {}
        : {
            ClippingPlanes: {
              ClippingPlane: [{ Location: pointXml(clipping.at), Direction: pointXml(clipping.hidden) }],
            },
          }),
    },
  });
}

/** The older schema allows neither an empty selection nor components without a visibility. */
function componentsXml({ coloured }: TopicView, version: BcfVersion): XmlNode | undefined {
  const hints = { '@SpacesVisible': 'false', '@SpaceBoundariesVisible': 'false', '@OpeningsVisible': 'false' };
  const components = (globalIds: readonly string[]) => globalIds.map((globalId) => ({ '@IfcGuid': globalId }));
  const selected = components(coloured.flatMap(({ globalIds }) => globalIds));
  const isNew = version === '3.0';
  return {
    ...(isNew ? {} : { ViewSetupHints: hints }),
    ...(selected.length === 0 ? {} : { Selection: { Component: selected } }),
    Visibility: { '@DefaultVisibility': 'true', ...(isNew ? { ViewSetupHints: hints } : {}) },
    ...(selected.length === 0
      ? {}
      : {
          Coloring: {
            Color: coloured.map(({ colour, globalIds }) => ({
              '@Color': colour,
              ...(isNew ? { Components: { Component: components(globalIds) } } : { Component: components(globalIds) }),
            })),
          },
        }),
  };
}

function pointXml([x, y, z]: Vec3): XmlNode {
  return { X: number(x), Y: number(y), Z: number(z) };
}

/** To the micrometre: more digits would only tell of rounding. */
const number = (value: number): string => String(Number(value.toFixed(6)) + 0);
