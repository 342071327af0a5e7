import { type Finding, finding } from '../../../domain/finding.ts';

/** What is met while an ifcXML is read, told once for each kind of thing. */
export class XmlRemarks {
  private commas = 0;
  private firstComma = '';
  private unreadable = 0;
  private firstUnreadable = '';
  private encodingBroken = false;
  private readonly leftOut = new Map<string, number>();

  decimalComma(text: string): void {
    if (this.commas++ === 0) this.firstComma = printable(text);
  }

  /** `where` is an entity and its attribute. */
  cannotRead(where: string, text: string): void {
    if (this.unreadable++ === 0) this.firstUnreadable = `"${printable(text)}" in ${where}`;
  }

  brokenEncoding(): void {
    this.encodingBroken = true;
  }

  leaveOut(entity: string): void {
    const name = printable(entity);
    this.leftOut.set(name, (this.leftOut.get(name) ?? 0) + 1);
  }

  findings(): Finding[] {
    const found: Finding[] = [];
    if (this.encodingBroken) found.push(finding('encoding-broken', ENCODING_BROKEN, 'Save the ifcXML as UTF-8.'));
    if (this.commas > 0) {
      const message = `Numbers with a decimal comma (${this.commas}, the first ${this.firstComma}) are read as if it were a point.`;
      found.push(
        finding('encoding-broken', message, 'Export again with the point as decimal sign; ifcXML has no other.'),
      );
    }
    if (this.unreadable > 0) {
      const more = this.unreadable > 1 ? `, and ${this.unreadable - 1} more` : '';
      const message = `A value of the ifcXML cannot be read and is left empty: ${this.firstUnreadable}${more}.`;
      found.push(finding('unreadable-element', message, 'Export the model again.', { severity: 'warning' }));
    }
    if (this.leftOut.size > 0) found.push(this.leftOutFinding());
    return found;
  }

  private leftOutFinding(): Finding {
    const kinds = [...this.leftOut].sort(([a, m], [b, n]) => n - m || (a < b ? -1 : 1));
    const named = kinds.slice(0, 5).map(([entity, count]) => `${count} ${entity}`);
    const more = kinds.length > 5 ? ` and ${kinds.length - 5} more kinds` : '';
    return finding(
      'out-of-scope',
      `The ifcXML holds instances that are not read (${named.join(', ')}${more}); an .ifc written of it is without them.`,
      'Export the model as STEP text (.ifc) where all of it is to come back.',
    );
  }
}

const ENCODING_BROKEN = 'The ifcXML has bytes that its encoding does not allow; it is read as Windows-1252.';

const printable = (text: string): string =>
  text
    .trim()
    .slice(0, 40)
    .replace(/[^\x20-\x7e]/g, '?');
