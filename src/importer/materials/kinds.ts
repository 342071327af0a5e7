/** Materials by the words in their names, in the languages that models come in. */

export interface Kind {
  readonly kind: string;
  /** Pa, kg/m3, 1/K: common practice, for weight and outline only. */
  readonly elasticModulus: number;
  readonly density: number;
  readonly expansion: number;
}

const CONCRETE: Kind = { kind: 'concrete', elasticModulus: 31e9, density: 2500, expansion: 10e-6 };
const TIMBER: Kind = { kind: 'timber', elasticModulus: 11e9, density: 450, expansion: 5e-6 };
const ALUMINIUM: Kind = { kind: 'aluminium', elasticModulus: 70e9, density: 2700, expansion: 23e-6 };
const RUBBER: Kind = { kind: 'rubber', elasticModulus: 0.01e9, density: 1200, expansion: 200e-6 };
const PLASTIC: Kind = { kind: 'plastic', elasticModulus: 2.5e9, density: 1300, expansion: 80e-6 };
const GLASS: Kind = { kind: 'glass', elasticModulus: 70e9, density: 2500, expansion: 9e-6 };
const MASONRY: Kind = { kind: 'masonry', elasticModulus: 5e9, density: 1900, expansion: 6e-6 };
const STAINLESS: Kind = { kind: 'stainless steel', elasticModulus: 200e9, density: 7900, expansion: 16e-6 };
export const STEEL: Kind = { kind: 'steel', elasticModulus: 210e9, density: 7850, expansion: 12e-6 };

/**
 * First match decides: "Stahlbeton" is concrete though it holds "Stahl", "STEEL/NEOPRENE" a bearing pad. Words that are
 * part of others stand between word boundaries.
 */
const WORDS: readonly (readonly [pattern: RegExp, kind: Kind])[] = [
  [/neopren|rubber|gummi|\bepdm\b|elastomer|caoutchouc/i, RUBBER],
  [/concret|beton|béton|betão|hormig|calcestruzzo|cemento|бетон|\bL?C\s?\d{2,3}\/\d{2,3}\b/i, CONCRETE],
  [/timber|\bwood|plywood|hardwood|softwood|holz|\bhout|\bbois\b|madera|madeira|legno|\bträ\b|\btre(verk)?\b/i, TIMBER],
  [/limtre|limträ|glulam|lamell|drewno|dřevo|puu\b|дерев|\b(BSH|KVH|LVL|CLT)\b|\bGL\s?\d{2}[hc]?\b/i, TIMBER],
  // EN 338. C35 and above are also steels of EN 10083.
  [
    /^\s*(?:C\s?(?:14|16|18|20|22|24|27|30)|D\s?(?:18|24|27|30|35|40|45|50|55|60|65|70|75|80))(?=\s*$|[\s,;(])/i,
    TIMBER,
  ],
  [/alumin|\balu\b|allumin|алюмин|\b(?:EN[ -]?)?AW[ -]?\d{4}|\bEN AW\b|\b[567]\d{3}[ -]?T\d|\bAlMg/i, ALUMINIUM],
  [/masonry|brick|mauerwerk|ziegel|\bbrique|mattone|ladrillo|\bstone\b|gypsum|\bgips/i, MASONRY],
  [/\bglass?\b|\bverre\b|\bvidrio\b|\bvetro\b/i, GLASS],
  [/plastic|kunststoff|\bPVC\b|\bGRP\b|\bGFK\b|\bPU\b|polycarbonat|polyurethan/i, PLASTIC],
  [/stainless|inox|edelstahl|rostfri|rvs\b/i, STAINLESS],
  [/steel|stahl|staal|stål|\bstal\b|acier|acero|acciaio|\baço|\bocel|teräs|çelik|сталь|\bmetal\b|鋼|钢/i, STEEL],
];

export function kindIn(name: string): Kind | null {
  return WORDS.find(([pattern]) => pattern.test(name))?.[1] ?? null;
}
