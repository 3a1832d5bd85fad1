/** Id of the inert script element that holds the worksheet in a .standfast.html file. */
export const BLOCK_ID = 'standfast-worksheet';

/** Id of the part that can be read without the program. */
export const READABLE_ID = 'standfast-readable';

export type Found =
  | { readonly ok: true; readonly text: string; readonly from: number; readonly to: number }
  | { readonly ok: false; readonly sentence: string };

/**
 * Finds the worksheet in a saved page without running any of it: scripts, styles and comments are passed over as a
 * browser passes over them, so that the program's own text can hold anything.
 *
 * @param html the text of a .standfast.html file
 * @returns the text between the tags, and where it stands
 */
export function findWorksheetBlock(html: string): Found {
  const found: Found[] = [];
  const opening = /<(?:!--|(script|style|textarea|title)(?=[\s/>]))/gi;
  for (let match = opening.exec(html); match !== null; match = opening.exec(html)) {
    const name = match[1]?.toLowerCase();
    const tagEnd = name === undefined ? opening.lastIndex : endOfTag(html, opening.lastIndex);
    const end = name === undefined ? html.indexOf('-->', tagEnd) : endOfElement(html, name, tagEnd);
    // What is opened and never closed reaches to the end of the page.
    if (tagEnd < 0 || end < 0) break;
    if (name === 'script' && isBlock(html.slice(opening.lastIndex, tagEnd - 1))) {
      found.push({ ok: true, text: html.slice(tagEnd, end), from: tagEnd, to: end });
    }
    opening.lastIndex = end;
  }
  if (found.length === 1) return found[0] as Found;
  const what =
    found.length === 0 ? 'There is no worksheet in this page' : 'There is more than one worksheet in this page';
  return { ok: false, sentence: `${what}: open a page that was saved from Standfast.` };
}

/**
 * The page with another worksheet in it; everything else stays as it is, to the byte.
 *
 * @param json the worksheet as JSON text
 * @throws RangeError where the page has no block for one
 */
export function replaceWorksheetBlock(html: string, json: string): string {
  const found = findWorksheetBlock(html);
  if (!found.ok) throw new RangeError(`*html* must hold one worksheet block; got: ${found.sentence}`);
  return `${html.slice(0, found.from)}${escapeForScript(json)}${html.slice(found.to)}`;
}

/**
 * A page with a worksheet in it: first the part that can be read without the program, then the worksheet.
 *
 * @param shell the page as built, with neither of the two in it
 * @param readable HTML as `readablePart` writes it
 * @param json the worksheet as JSON text
 * @throws RangeError where the page has no end of its body
 */
export function pageWithWorksheet(shell: string, readable: string, json: string): string {
  const end = shell.lastIndexOf('</body>');
  if (end < 0) throw new RangeError('*shell* must hold </body>; got a page without it');
  const block = `<script type="application/json" id="${BLOCK_ID}">${escapeForScript(json)}</script>`;
  return `${shell.slice(0, end).trimEnd()}\n${readable}\n${block}\n</body>\n</html>\n`;
}

/** JSON text that can stand inside a script element: "<" can only be part of a string there. */
export function escapeForScript(json: string): string {
  return json.replaceAll('<', '\\u003c');
}

const ID = /(?:^|[\s"'/])id\s*=\s*(?:"([^"]*)"|'([^']*)'|([^\s"'>]+))/i;

function isBlock(attributes: string): boolean {
  const match = ID.exec(attributes);
  return match !== null && (match[1] ?? match[2] ?? match[3]) === BLOCK_ID;
}

/** The place after the first ">" outside quotes; -1 where there is none. */
function endOfTag(html: string, from: number): number {
  let quote = '';
  for (let i = from; i < html.length; i++) {
    const char = html[i] as string;
    if (quote !== '') {
      if (char === quote) quote = '';
    } else if (char === '>') return i + 1;
    else if (char === '"' || char === "'") quote = char;
  }
  return -1;
}

/** Where the closing tag begins; -1 where there is none. */
function endOfElement(html: string, name: string, from: number): number {
  const closing = new RegExp(`</${name}(?=[\\s/>])`, 'gi');
  closing.lastIndex = Math.max(0, from);
  return closing.exec(html)?.index ?? -1;
}
