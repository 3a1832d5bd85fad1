import { Refusal } from '../refusal.ts';

const SIGNATURES: readonly { readonly bytes: readonly number[]; readonly what: string }[] = [
  { bytes: [0x50, 0x4b, 0x03, 0x04], what: 'a spreadsheet or another zip container' },
  { bytes: [0x50, 0x4b, 0x05, 0x06], what: 'an empty zip container' },
  { bytes: [0xd0, 0xcf, 0x11, 0xe0], what: 'a spreadsheet in the old binary form' },
  { bytes: [0x1f, 0x8b], what: 'a compressed file' },
  { bytes: [0x25, 0x50, 0x44, 0x46, 0x2d], what: 'a PDF document' },
  { bytes: [0x89, 0x50, 0x4e, 0x47], what: 'a picture' },
  { bytes: [0xff, 0xd8, 0xff], what: 'a picture' },
];

/**
 * Refuses a file whose first bytes say that it is a spreadsheet, an archive, a document or a page, not delimited text.
 *
 * @param bytes the file
 * @param name its name
 * @throws Refusal that says what it is and to export the table as CSV
 * @source file signatures: common practice
 */
export function refuseContainer(bytes: Uint8Array, name: string): void {
  for (const { bytes: signature, what } of SIGNATURES) {
    if (signature.every((byte, i) => bytes[i] === byte)) {
      throw new Refusal(`${name} is ${what}, not delimited text: export the table as CSV and read that file.`);
    }
  }
  const head = String.fromCharCode(...bytes.subarray(0, 16)).toLowerCase();
  if (head.startsWith('<!doctype') || head.startsWith('<html') || head.startsWith('<?xml')) {
    throw new Refusal(`${name} is a web page or XML, not delimited text: export the table as CSV and read that file.`);
  }
}
