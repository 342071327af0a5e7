// AssemblyScript, compiled to WebAssembly by scripts/build-kernel.mjs; `plain-index.ts` is its other half and says how the two share
// the work. It goes over a window of a STEP file in steps of 16 bytes (some 35 ns an instance, a third of what the
// scanner in TypeScript takes) and knows the plainest writing only: `#12=KEYWORD(...);` without comments, with no backslash at a
// text's end and with a keyword it was taught. At anything else it stops.

const WINDOW_SIZE: u32 = 1 << 18;
/** Loads of 16 bytes may begin at the last byte of the window, and keywords are longer. */
const MARGIN: u32 = 128;
/** The shortest instance, `#1=A();`, has seven bytes. */
const MOST_ROWS: u32 = WINDOW_SIZE / 7 + 1;
const MOST_KEYWORDS: u32 = 4096;
const LONGEST_KEYWORD: u32 = 64;
const SLOTS: u32 = 4 * MOST_KEYWORDS;
/** As in keywords.ts: the last six keywords, folded into one number. */
const LATELY: u32 = 0xfff;
const SPREAD: u32 = 0x2f5;

const window: usize = memory.data(WINDOW_SIZE + MARGIN, 16);
const ids: usize = memory.data(4 * MOST_ROWS, 16);
const opens: usize = memory.data(4 * MOST_ROWS, 16);
const codes: usize = memory.data(2 * MOST_ROWS, 16);
/** Of each keyword: its text with the bracket that follows, its length with that, and its code. */
const texts: usize = memory.data(MOST_KEYWORDS * LONGEST_KEYWORD, 16);
const lengths: usize = memory.data(MOST_KEYWORDS, 16);
const codeOf: usize = memory.data(2 * MOST_KEYWORDS, 16);
/** By hash of the text: the keyword's number + 1. */
const slots: usize = memory.data(2 * SLOTS, 16);
/** By the keywords that came last: the number + 1 of what followed them the last time. */
const following: usize = memory.data(2 * (LATELY + 1), 16);

let keywordCount: u32 = 0;
let lately: u32 = 0;
let rowCount: u32 = 0;
/** Whether the window's end was met inside an instance. */
let cutOff: bool = false;

export const windowSize: u32 = WINDOW_SIZE;
export const mostRows: u32 = MOST_ROWS;
export function windowAt(): usize {
  return window;
}
export function idsAt(): usize {
  return ids;
}
export function opensAt(): usize {
  return opens;
}
export function codesAt(): usize {
  return codes;
}

/** How many instances the last call of `index` found. */
export function rows(): u32 {
  return rowCount;
}

/** Whether it stopped because the window ends, and not because something there is not plain. */
export function isCutOff(): bool {
  return cutOff;
}

/** Forgets all keywords. */
export function reset(): void {
  memory.fill(slots, 0, 2 * SLOTS);
  memory.fill(following, 0, 2 * (LATELY + 1));
  keywordCount = 0;
  lately = 0;
}

/** Learns that the keyword written at `at` in the window, `length` bytes before its bracket, has this code. */
export function learn(at: u32, length: u32, code: u32): void {
  if (keywordCount == MOST_KEYWORDS || length >= LONGEST_KEYWORD || lookUp(window + at) >= 0) return;
  const number = keywordCount++;
  const text = texts + number * LONGEST_KEYWORD;
  memory.copy(text, window + at, length);
  store<u8>(text + length, 0x28);
  store<u8>(lengths + number, length + 1);
  store<u16>(codeOf + 2 * number, code);
  let slot = hashOf(window + at, length) & (SLOTS - 1);
  while (load<u16>(slots + 2 * slot) != 0) slot = (slot + 1) & (SLOTS - 1);
  store<u16>(slots + 2 * slot, number + 1);
}

function hashOf(at: usize, length: u32): u32 {
  let hash = length;
  for (let i: u32 = 0; i < length; i++) hash = (hash ^ load<u8>(at + i)) * 0x01000193;
  return hash ^ (hash >> 15);
}

/** Whether the keyword, with the bracket after it, stands at `p`. */
@inline
function isSpelt(number: u32, p: usize): bool {
  const length = <i32>load<u8>(lengths + number);
  const text = texts + number * LONGEST_KEYWORD;
  for (let i: i32 = 0; i < length; i += 16) {
    const same = i8x16.bitmask(i8x16.eq(v128.load(p + i), v128.load(text + i)));
    const left = length - i;
    const wanted = left >= 16 ? 0xffff : (1 << left) - 1;
    if ((same & wanted) != wanted) return false;
  }
  return true;
}

/** The number of the keyword at `p`; -1 where it is not known or something else than a bracket follows. */
@inline
function keywordAt(p: usize): i32 {
  // Exporters write the instances of one element after another in the same order.
  const expected = <i32>load<u16>(following + 2 * lately) - 1;
  if (expected >= 0 && isSpelt(expected, p)) return expected;
  return lookUp(p);
}

function lookUp(p: usize): i32 {
  let length: u32 = 0;
  while (length < LONGEST_KEYWORD && load<u8>(p + length) != 0x28) length++;
  let slot = hashOf(p, length) & (SLOTS - 1);
  let number = <i32>load<u16>(slots + 2 * slot) - 1;
  while (number >= 0 && (load<u8>(lengths + number) != length + 1 || !isSpelt(number, p))) {
    slot = (slot + 1) & (SLOTS - 1);
    number = <i32>load<u16>(slots + 2 * slot) - 1;
  }
  if (number >= 0) store<u16>(following + 2 * lately, number + 1);
  return number;
}

/** A bit for each of the 16 bytes at `p` that is one of ' ( ) / ; = */
@inline
function stopsAt(p: usize): u32 {
  const bytes = v128.load(p);
  const brackets = i8x16.le_u(i8x16.sub(bytes, i8x16.splat(0x27)), i8x16.splat(2));
  const others = v128.or(
    v128.or(i8x16.eq(bytes, i8x16.splat(0x2f)), i8x16.eq(bytes, i8x16.splat(0x3b))),
    i8x16.eq(bytes, i8x16.splat(0x3d)),
  );
  return i8x16.bitmask(v128.or(brackets, others));
}

/** The next apostrophe from `p` on; not below `end` where there is none before it. */
@inline
function apostropheFrom(p: usize, end: usize): usize {
  let at = p;
  while (at < end) {
    const found = i8x16.bitmask(i8x16.eq(v128.load(at), i8x16.splat(0x27)));
    if (found != 0) return at + ctz(found);
    at += 16;
  }
  return at;
}

/** The offset after the bracket that closes the one at `open`; 0 where that is not plain or not before `end`. */
@inline
function afterBrackets(open: usize, end: usize): usize {
  let depth = 0;
  let p = open;
  while (p < end) {
    let stops = stopsAt(p);
    let next = p + 16;
    while (stops != 0) {
      const at = p + ctz(stops);
      stops &= stops - 1;
      const byte = load<u8>(at);
      if (byte == 0x29) {
        if (--depth == 0) return at + 1;
      } else if (byte == 0x28) {
        depth++;
      } else if (byte == 0x27) {
        const close = apostropheFrom(at + 1, end);
        cutOff = close >= end;
        if (cutOff || load<u8>(close - 1) == 0x5c) return 0;
        next = close + 1;
        stops = 0;
      } else return 0;
    }
    p = next;
  }
  cutOff = true;
  return 0;
}

/**
 * Indexes the plain instances from `from` on of a window filled up to `to`, of which the first byte is that at `base` in the file.
 * The offset after the last of them, whatever the reason to stop.
 */
export function index(from: u32, to: u32, base: u32): u32 {
  const end = window + to;
  cutOff = false;
  const toFile = base - <u32>window;
  let count: u32 = 0;
  let start = window + from;
  for (;;) {
    let p = start;
    while (p < end && load<u8>(p) <= 0x20) p++;
    start = p;
    if (load<u8>(p) != 0x23) break;
    let id: u32 = 0;
    let digit = <u32>load<u8>(++p) - 0x30;
    while (digit < 10) {
      id = 10 * id + digit;
      digit = <u32>load<u8>(++p) - 0x30;
    }
    // Nine digits and the hash are surely below 2^32.
    const width = p - start;
    if (width < 2 || width > 10) break;
    while (load<u8>(p) == 0x20) p++;
    if (load<u8>(p) != 0x3d) break;
    p++;
    while (load<u8>(p) == 0x20) p++;
    const keyword = keywordAt(p);
    if (keyword < 0) break;
    const open = p + load<u8>(lengths + keyword) - 1;
    p = afterBrackets(open, end);
    // The file may go on where the window ends.
    if (p == 0 || p >= end || load<u8>(p) != 0x3b) break;
    const code = <u32>load<u16>(codeOf + 2 * keyword);
    store<u32>(ids + 4 * count, id);
    store<u32>(opens + 4 * count, toFile + <u32>open);
    store<u16>(codes + 2 * count, code);
    count++;
    lately = ((lately << 2) ^ (code * SPREAD)) & LATELY;
    start = p + 1;
  }
  rowCount = count;
  // Close to the end a keyword or a semicolon may only seem to be wrong.
  cutOff = cutOff || start + MARGIN > end;
  return <u32>(start - window);
}
