import type { Member } from '../domain/member.ts';
import { between, cross, distance, subtract, unit } from '../domain/vector.ts';
import type { Plate } from '../importer/evidence/types.ts';

/** Cleats and plates that are drawn as members: the boxes of their bodies, which fasten what they touch as plates do. */
export function platesOfCleats(cleats: readonly Member[]): Plate[] {
  return cleats.flatMap(({ axis: [start, finish], zAxis, section, globalId, name, tag, class: written }): Plate[] => {
    const along = unit(subtract(finish, start));
    if (along === null || section === null) return [];
    return [
      {
        globalId,
        name: tag ?? name,
        class: written,
        centre: between(start, finish, 0.5),
        axes: [along, zAxis, cross(along, zAxis)],
        halfSizes: [distance(start, finish) / 2, section.depth / 2, section.width / 2],
        assembly: null,
      },
    ];
  });
}
