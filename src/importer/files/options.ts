/** How much a file may be made of, so that a small one cannot be grown beyond the machine. */
export interface OpenOptions {
  /** Most bytes of a model once unpacked. */
  readonly largest: number;
  /** Most unpacked bytes for each packed one. */
  readonly ratio: number;
  /** Most files in a zip. */
  readonly mostEntries: number;
  /** Most bytes of an ifcXML: the tree of its elements takes many times its size. */
  readonly largestXml: number;
  /** Most XML elements inside one another. */
  readonly depth: number;
}

export const OPEN_DEFAULTS: OpenOptions = {
  largest: 2 * 1024 ** 3,
  ratio: 200,
  mostEntries: 1000,
  largestXml: 96 * 1024 ** 2,
  depth: 256,
};
