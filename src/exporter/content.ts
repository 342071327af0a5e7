import { type BcfOptions, writeBcf } from '../bcf/write-bcf.ts';
import type { Result } from '../domain/result.ts';
import { drawSheet } from '../drawing/sheet.ts';
import type { StepFile } from '../step/step-file.ts';
import { encodeText, type Output } from './chunks.ts';
import { tableToCsv } from './csv.ts';
import { annotate } from './ifc/annotate.ts';
import { writePicture } from './ifc/picture/write-picture.ts';
import { writeView } from './ifc/view/write-view.ts';
import { resultToJson } from './json.ts';
import type { Content } from './outputs/formats.ts';
import { reportOf } from './report/report.ts';
import { workbook } from './xlsx/workbook.ts';
import { zipOne } from './zip-one.ts';

/**
 * What each planned file holds for this result; `file` is the model that an annotated copy is made of, `bcf` how topics are
 * written.
 */
export function contentOf(result: Result, file: StepFile, bcf: Partial<BcfOptions> = {}): (content: Content) => Output {
  return (content) => {
    switch (content.kind) {
      case 'json':
        return resultToJson(result);
      case 'csv':
        return tableToCsv(result, content.table);
      case 'ifc':
        return annotate(file, result);
      case 'ifczip':
        return zipOne(content.name, annotate(file, result));
      case 'svg':
        return encodeText([drawSheet(result)]);
      case 'bcf':
        return [writeBcf(result, bcf)];
      case 'html':
        return reportOf(result);
      case 'xlsx':
        return workbook(result);
      case 'view':
        return writeView(result);
      case 'picture':
        return writePicture(result);
    }
  };
}
