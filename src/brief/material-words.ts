// Words for materials that are not steel, as models in several languages write them. Common practice.
// Stems stand inside longer words too ("Brettschichtholz", "Stahlbeton"); the others are short and must stand alone.
const STEMS: readonly string[] = [
  ...[
    'timber',
    'lumber',
    'plywood',
    'glulam',
    'concrete',
    'masonry',
    'brick',
    'alumin',
    'gypsum',
    'plaster',
    'plastic',
  ],
  ...['holz', 'beton', 'mauerwerk', 'ziegel', 'verglasung'],
  ...['béton', 'maçonnerie', 'brique', 'verre', 'lamellé'],
  ...['madera', 'hormigón', 'hormigon', 'ladrillo', 'mampostería', 'vidrio'],
  ...['legno', 'legname', 'calcestruzzo', 'muratura', 'laterizio', 'vetro'],
  ...[
    'madeira',
    'concreto',
    'betão',
    'alvenaria',
    'metselwerk',
    'baksteen',
    'limträ',
    'limtræ',
    'murværk',
    'tegelsten',
  ],
  ...['drewno', 'żelbet', 'dřevo', 'cihla', 'дерев', 'древес', 'бетон', 'кирпич', 'алюмин', '木材', '混凝土'],
];

const WORDS: ReadonlySet<string> = new Set([
  ...['alu', 'wood', 'wooden', 'glass', 'glas', 'stone', 'bois', 'tre', 'træ', 'trä', 'hout', 'puu', 'tiili', 'drevo'],
  ...[
    'bsh',
    'kvh',
    'clt',
    'lvl',
    'osb',
    'mdf',
    'pvc',
    'upvc',
    'pu',
    'oak',
    'pine',
    'spruce',
    'larch',
    'fichte',
    'lärche',
    'eiche',
  ],
]);

// Strength classes: timber (EN 338; C35 and above are also steels of EN 10083, and say nothing), glued laminated timber
// (EN 14080), normal and lightweight concrete (EN 206), wrought aluminium (EN 573, and by alloy and temper).
const GRADES: readonly RegExp[] = [
  /(?<![\p{L}\d])c ?(?:14|16|18|20|22|24|27|30)(?![\p{L}\d/])/u,
  /(?<![\p{L}\d])d ?(?:18|24|27|30|35|40|45|50|55|60|65|70|75|80)(?![\p{L}\d/.])/u,
  /(?<![\p{L}\d])gl ?\d{2}[hc]?(?![\p{L}\d])/u,
  /(?<![\p{L}\d])l?c ?\d{2,3}\/\d{2,3}(?!\d)/u,
  /(?<![\p{L}\d])(?:en[ -]?)?aw[ -]?\d{4}/u,
  /(?<![\p{L}\d])en[ -]?aw(?![\p{L}\d])/u,
  /(?<![\p{L}\d])[567]\d{3}[ -]?t\d/u,
  /(?<![\p{L}\d])almg/u,
];

const STEEL: ReadonlySet<string> = new Set([
  ...['steel', 'stahl', 'acier', 'acero', 'acciaio', 'staal', 'stål', 'aço', 'stal', 'ocel', 'teräs', 'сталь'],
]);

// Bearing pads and gaskets, which detailers file under steel.
const RUBBER: readonly string[] = ['neopren', 'elastomer', 'rubber', 'gummi', 'caoutchouc'];

/** Whether a material's name plainly says something else than steel: a foreign word in it and no word for steel alone. */
export function isPlainlyNotSteel(name: string): boolean {
  const text = name.normalize('NFC').toLowerCase();
  const words = text.split(/[^\p{L}\p{N}]+/u);
  if (RUBBER.some((stem) => text.includes(stem))) return true;
  if (words.some((word) => STEEL.has(word))) return false;
  return (
    words.some((word) => WORDS.has(word)) ||
    STEMS.some((stem) => text.includes(stem)) ||
    GRADES.some((grade) => grade.test(text))
  );
}
