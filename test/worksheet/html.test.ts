import { describe, expect, test } from 'vitest';
import {
  escapeForScript,
  findWorksheetBlock,
  pageWithWorksheet,
  replaceWorksheetBlock,
} from '../../src/worksheet/html.ts';

const json = '{"title":"a \\u003c/script> b"}';
const block = `<script type="application/json" id="standfast-worksheet">${json}</script>`;
const program = `<script type="module">const t = '<script id="standfast-worksheet">no<\\/script>'; if (1 <2) a("-->");</script>`;

const page = (...parts: string[]) =>
  `<!doctype html><html><head><title>&lt;script id="standfast-worksheet"> in a title</title>${parts.join('\n')}</head><body></body></html>`;

const textIn = (html: string) => {
  const found = findWorksheetBlock(html);
  return found.ok ? found.text : found.sentence;
};

describe('findWorksheetBlock', () => {
  test.each([
    ['before the program', page(block, program)],
    ['after the program, whose text names the block', page(program, block)],
    ['beside a comment with another', page(`<!-- ${block} -->`, block)],
    [
      'beside a style and a text area that name one',
      page(`<style>/* ${block.slice(0, 40)} */</style><textarea>${block.slice(0, 57)}</textarea>`, block),
    ],
    [
      'with single quotes',
      page(
        block.replaceAll('"application/json" id="standfast-worksheet"', `'application/json' id='standfast-worksheet'`),
      ),
    ],
    [
      'with the id first and no quotes',
      page(
        block.replace(
          'type="application/json" id="standfast-worksheet"',
          'id=standfast-worksheet type=application/json',
        ),
      ),
    ],
    ['in capitals', page(block.replace('<script', '<SCRIPT').replace('</script>', '</SCRIPT >'))],
    ['with a > inside an attribute', page(block.replace('id=', 'data-note="a > b" id='))],
  ])('by hand: a block %s', (_title, html) => {
    expect(textIn(html)).toBe(json);
  });

  test.each([
    ['no block', page(program), 'There is no worksheet in this page'],
    ['a block that is only in a comment', page(`<!-- ${block} -->`), 'There is no worksheet'],
    [
      'an element of another name',
      page(block.replace('<script', '<p').replace('</script>', '</p>')),
      'There is no worksheet',
    ],
    ['a longer id', page(block.replace('standfast-worksheet', 'standfast-worksheet-2')), 'There is no worksheet'],
    ['a block that is not closed', page(block.replace('</script>', '')), 'There is no worksheet'],
    ['two blocks', page(block, block), 'There is more than one worksheet'],
    ['an empty text', '', 'There is no worksheet'],
  ])('refuses: %s', (_title, html, sentence) => {
    expect(textIn(html)).toContain(sentence);
  });

  test('degenerate: a page made to be slow is read quickly', () => {
    const began = performance.now();
    findWorksheetBlock('<script '.repeat(20_000));
    findWorksheetBlock('<!--'.repeat(200_000));
    findWorksheetBlock(`<script ${'"'.repeat(100_000)}`);
    expect(performance.now() - began).toBeLessThan(1_000);
  });
});

describe('replaceWorksheetBlock', () => {
  test('invariance: only the block changes, and what is put in comes out again', () => {
    const hostile = JSON.stringify({ title: '</script><script>alert(1)</script><!-- $& $1' });
    const html = page(program, block);
    const changed = replaceWorksheetBlock(html, hostile);
    expect(JSON.parse(textIn(changed))).toEqual(JSON.parse(hostile));
    expect(changed.replace(escapeForScript(hostile), () => json)).toBe(html);
    expect(changed).not.toContain('<script>alert');
  });

  test('refuses: a page without a block', () => {
    expect(() => replaceWorksheetBlock(page(program), '{}')).toThrow('*html*');
  });
});

describe('pageWithWorksheet', () => {
  test('by hand: the readable part and then the block stand last in the body; the block is found again', () => {
    const hostile = JSON.stringify({ title: '</script><script>alert(1)</script></body>' });
    const html = pageWithWorksheet(page(program), '<noscript>read</noscript>', hostile);
    expect(JSON.parse(textIn(html))).toEqual(JSON.parse(hostile));
    expect(html.startsWith(`${page(program).split('</body>')[0]}\n<noscript>read</noscript>\n<script`)).toBe(true);
    expect(html.endsWith('</script>\n</body>\n</html>\n')).toBe(true);
  });

  test('refuses: a page without an end of its body', () => {
    expect(() => pageWithWorksheet('<p>', '', '{}')).toThrow('*shell*');
  });
});
