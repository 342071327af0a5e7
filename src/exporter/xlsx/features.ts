import type writeExcelFile from 'write-excel-file/node';
import {
  getCellAddress,
  getOrderOfSiblings,
  getSelfClosingTagMarkup,
  insertElementMarkupAccordingToOrderOfSiblings,
} from 'write-excel-file/utility';

type Options = NonNullable<Parameters<typeof writeExcelFile>[1]>;
type Feature = NonNullable<Options['features']>[number];

const SHEET = 'xl/worksheets/sheet{id}.xml';

/** Filters over the whole of each sheet whose size is given, rows and columns by title: the library has none of its own. */
export function autoFilter(sizes: ReadonlyMap<string, readonly [rows: number, columns: number]>): Feature {
  const transform = (xml: string, { sheet = '' }: { readonly sheet?: string }): string => {
    const size = sizes.get(sheet);
    if (size === undefined) return xml;
    const ref = `${getCellAddress(0, 0)}:${getCellAddress(size[0] - 1, size[1] - 1)}`;
    const order = getOrderOfSiblings(SHEET, 'worksheet') ?? [];
    return insertElementMarkupAccordingToOrderOfSiblings(
      xml,
      getSelfClosingTagMarkup('autoFilter', { ref }),
      order,
      'worksheet',
    );
  };
  return { files: { transform: { [SHEET]: { transform } } } };
}

/** The style that all others stand on by its name: readers warn where a workbook has none. */
export const normalStyle: Feature = {
  files: {
    transform: {
      'xl/styles.xml': {
        transform: (xml) => {
          const plain = getSelfClosingTagMarkup('xf', { numFmtId: 0, fontId: 0, fillId: 0, borderId: 0 });
          const normal = getSelfClosingTagMarkup('cellStyle', { name: 'Normal', xfId: 0, builtinId: 0 });
          const based = withPart(xml, 'cellStyleXfs', plain);
          return withPart(based, 'cellStyles', normal);
        },
      },
    },
  },
};

/** The style sheet with a part that holds one element, where it has none. */
function withPart(xml: string, part: string, element: string): string {
  if (xml.includes(`<${part} `) || xml.includes(`<${part}>`)) return xml;
  const order = getOrderOfSiblings('xl/styles.xml', 'styleSheet') ?? [];
  const markup = `<${part} count="1">${element}</${part}>`;
  return insertElementMarkupAccordingToOrderOfSiblings(xml, markup, order, 'styleSheet');
}
