import { crc32, deflateRawSync } from 'node:zlib';

/** A file to be zipped, and what the zip is to say of it where that is not the truth. */
export interface ToZip {
  readonly name: string;
  readonly content: string | Uint8Array;
  /** 0 stored, 8 Deflate; of any other method the content is left as it is. */
  readonly method?: number;
  readonly flags?: number;
  readonly crc?: number;
  readonly size?: number;
}

const DESCRIPTOR = 0x08;

/** A zip by the ZIP application note: local headers (with a data descriptor where flag 8 says so), the directory, its end. */
export function zipOf(files: readonly ToZip[], form: 'plain' | 'zip64' = 'plain'): Buffer {
  const local: Buffer[] = [];
  const directory: Buffer[] = [];
  let offset = 0;
  for (const file of files) {
    const content = Buffer.from(file.content);
    const { name, method = 8, flags = 0, crc = crc32(content), size = content.length } = file;
    const packed = method === 8 ? deflateRawSync(content) : content;
    const hasDescriptor = (flags & DESCRIPTOR) !== 0;
    const bytes = Buffer.from(name);
    const header = (signature: number, head: readonly number[], atLocal: boolean) => {
      const isLater = atLocal && hasDescriptor;
      const inExtra = form === 'zip64' && !atLocal;
      const extra = inExtra ? Buffer.concat([u16(1, 16), u64(size, packed.length)]) : Buffer.alloc(0);
      const sizes = inExtra ? [0xffffffff, 0xffffffff] : isLater ? [0, 0] : [packed.length, size];
      const middle = Buffer.concat([
        u16(20, flags, method, 0, 0),
        u32(isLater ? 0 : crc, ...sizes),
        u16(bytes.length, extra.length),
      ]);
      const tail = atLocal ? Buffer.alloc(0) : Buffer.concat([u16(0, 0, 0), u32(0, offset)]);
      return Buffer.concat([u32(signature), u16(...head), middle, tail, bytes, extra]);
    };
    const descriptor = hasDescriptor ? u32(0x08074b50, crc, packed.length, size) : Buffer.alloc(0);
    directory.push(header(0x02014b50, [20], false));
    const entry = Buffer.concat([header(0x04034b50, [], true), packed, descriptor]);
    local.push(entry);
    offset += entry.length;
  }
  const listing = Buffer.concat(directory);
  const count = files.length;
  if (form === 'plain') {
    return Buffer.concat([
      ...local,
      listing,
      u32(0x06054b50),
      u16(0, 0, count, count),
      u32(listing.length, offset),
      u16(0),
    ]);
  }
  const end64 = Buffer.concat([
    u32(0x06064b50),
    u64(44),
    u16(45, 45),
    u32(0, 0),
    u64(count, count, listing.length, offset),
  ]);
  const locator = Buffer.concat([u32(0x07064b50, 0), u64(offset + listing.length), u32(1)]);
  const end = Buffer.concat([u32(0x06054b50), u16(0, 0, 0xffff, 0xffff), u32(0xffffffff, 0xffffffff), u16(0)]);
  return Buffer.concat([...local, listing, end64, locator, end]);
}

function u16(...values: readonly number[]): Buffer {
  const buffer = Buffer.alloc(2 * values.length);
  for (const [i, value] of values.entries()) buffer.writeUInt16LE(value, 2 * i);
  return buffer;
}

function u32(...values: readonly number[]): Buffer {
  const buffer = Buffer.alloc(4 * values.length);
  for (const [i, value] of values.entries()) buffer.writeUInt32LE(value >>> 0, 4 * i);
  return buffer;
}

function u64(...values: readonly number[]): Buffer {
  const buffer = Buffer.alloc(8 * values.length);
  for (const [i, value] of values.entries()) buffer.writeBigUInt64LE(BigInt(value), 8 * i);
  return buffer;
}
