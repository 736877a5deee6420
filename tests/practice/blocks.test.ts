import type { Page } from 'playwright-core';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { startBrowser, withoutBrowser } from './browser.ts';
import type { Browsing } from './browser.ts';
import { openRoom } from './open-room.ts';
import type { OpenRoom } from './open-room.ts';

// What Slack's published reference says that its blocks and its mrkdwn look like; the markup is that of the practice page.
let browser: Browsing | null = null;
let room: OpenRoom;
let page: Page;

beforeAll(async () => {
  browser = await startBrowser();
  if (browser === null) return;
  room = await openRoom();
  ({ page } = await browser.open(room.address));
});
afterAll(async () => {
  if (browser === null) return;
  await browser.close();
  await room.close();
});
beforeEach((context) => {
  if (browser === null) withoutBrowser(context);
});

const names = { UADA: 'Ada', UDIVISOR: 'Divisor' };
/** Runs a function of one of the page's modules on these values and gives the markup of what comes back. */
const markup = (module: string, name: string, ...values: readonly unknown[]): Promise<string> =>
  page.evaluate<string>(
    `import('/${module}.js').then((module) => {
      const frame = document.createElement('div');
      frame.append(module.${name}(...${JSON.stringify(values)}, (action) => action));
      return frame.innerHTML;
    })`,
  );
const blocks = (...list: readonly object[]) => markup('blocks', 'renderBlocks', list, names);
const mrkdwn = (text: string) => markup('mrkdwn', 'mrkdwnNodes', text, names);

const text = (words: string, style?: object) => ({ type: 'text', text: words, ...(style ? { style } : {}) });
const rich = (...elements: readonly object[]) => ({ type: 'rich_text', elements });

describe('a block', () => {
  it.each<[string, object, string]>([
    [
      'section in plain text keeps its marks',
      { type: 'section', text: { type: 'plain_text', text: '*late* <b> &amp;' } },
      '<div class="section"><p>*late* &lt;b&gt; &amp;amp;</p></div>',
    ],
    [
      'section in mrkdwn, with fields and a button beside it',
      {
        type: 'section',
        text: { type: 'mrkdwn', text: '*late*', verbatim: true },
        fields: [
          { type: 'mrkdwn', text: '18' },
          { type: 'plain_text', text: '1,204' },
        ],
        accessory: { type: 'button', action_id: 'show', text: { type: 'plain_text', text: 'Show' } },
      },
      '<div class="section"><p><strong>late</strong></p><div class="fields"><div><p>18</p></div><div><p>1,204</p></div></div><button type="button" data-action="show">Show</button></div>',
    ],
    ['header', { type: 'header', text: { type: 'plain_text', text: 'Ferries' } }, '<h4>Ferries</h4>'],
    ['divider', { type: 'divider' }, '<hr>'],
    [
      'context',
      {
        type: 'context',
        elements: [
          { type: 'mrkdwn', text: '_May_' },
          { type: 'image', alt_text: 'A ferry' },
        ],
      },
      '<div class="small context"><p><em>May</em></p><p class="picture">Picture: A ferry</p></div>',
    ],
    [
      'picture as its words, without loading it',
      { type: 'image', image_url: 'https://harrowmere.example/a.png', alt_text: 'Two bars' },
      '<p class="picture">Picture: Two bars</p>',
    ],
    [
      'row of buttons, with the name that is read aloud',
      {
        type: 'actions',
        elements: [
          {
            type: 'button',
            action_id: 'show_working',
            text: { type: 'plain_text', text: 'Working' },
            accessibility_label: 'Show the working',
          },
        ],
      },
      '<div class="keys"><button type="button" data-action="show_working" aria-label="Show the working">Working</button></div>',
    ],
    [
      'rich text with styles, a person, a link and an emoji by its name',
      rich({
        type: 'rich_text_section',
        elements: [
          text('late', { bold: true, italic: true }),
          text(' '),
          text('x', { code: true }),
          text('y', { strike: true }),
          { type: 'user', user_id: 'UADA' },
          { type: 'link', url: 'https://harrowmere.example/', text: 'here' },
          { type: 'emoji', name: 'ferry' },
        ],
      }),
      '<p><em><strong>late</strong></em> <code>x</code><s>y</s>Ada<a href="https://harrowmere.example/" target="_blank" rel="noreferrer">here</a>:ferry:</p>',
    ],
    [
      'link to anything that is no address of the web as words',
      rich({
        type: 'rich_text_section',
        elements: [{ type: 'link', url: 'javascript:alert(1)', text: 'here' }],
      }),
      '<p>here</p>',
    ],
    [
      'quotation and a box',
      rich(
        { type: 'rich_text_quote', elements: [text('*18* of <12>')] },
        { type: 'rich_text_preformatted', elements: [text('18 of 12\n^^')] },
      ),
      '<blockquote>*18* of &lt;12&gt;</blockquote><pre>18 of 12\n^^</pre>',
    ],
    [
      'lists, numbered from where they begin, and set in',
      rich(
        {
          type: 'rich_text_list',
          style: 'bullet',
          indent: 1,
          elements: [{ type: 'rich_text_section', elements: [text('a')] }],
        },
        {
          type: 'rich_text_list',
          style: 'ordered',
          offset: 2,
          elements: [{ type: 'rich_text_section', elements: [text('c')] }],
        },
      ),
      '<ul class="indent-1"><li>a</li></ul><ol start="3"><li>c</li></ol>',
    ],
    [
      'table of raw and rich cells, numbers to the right',
      {
        type: 'table',
        column_settings: [{}, { align: 'right' }],
        rows: [
          [
            { type: 'raw_text', text: 'Group' },
            { type: 'raw_text', text: 'Cases' },
          ],
          [
            rich({ type: 'rich_text_section', elements: [text('night', { bold: true })] }),
            { type: 'raw_number', value: 18 },
          ],
        ],
      },
      '<div class="scroll" tabindex="0" role="group" aria-label="Table"><table><tr><th scope="col">Group</th><th scope="col" class="right">Cases</th></tr><tr><td><p><strong>night</strong></p></td><td class="right">18</td></tr></table></div>',
    ],
    ['of a type that the page does not know', { type: 'card' }, '<p>(a block of the type card)</p>'],
  ])('%s', async (_, block, expected) => {
    expect(await blocks(block)).toBe(expected);
  });
});

describe('mrkdwn', () => {
  it.each([
    ['18 &lt; 20 &amp; 20 &gt; 18', '<p>18 &lt; 20 &amp; 20 &gt; 18</p>'],
    ['&amp;lt;b&amp;gt;', '<p>&amp;lt;b&amp;gt;</p>'],
    [
      '*late* _again_ ~not~ `18 of *12*`',
      '<p><strong>late</strong> <em>again</em> <s>not</s> <code>18 of *12*</code></p>',
    ],
    ['*night _and_ day*', '<p><strong>night <em>and</em> day</strong></p>'],
    ['2*3*4, snake_case_name and * alone', '<p>2*3*4, snake_case_name and * alone</p>'],
    ['<@UADA> and <@UX|dora> of <#C1|ferries>', '<p>@Ada and @dora of ferries</p>'],
    ['<!here> <!date^1^{date}|May>', '<p>@here May</p>'],
    [
      '<https://harrowmere.example/?a=1&amp;b=2|R&amp;D>',
      '<p><a href="https://harrowmere.example/?a=1&amp;b=2" target="_blank" rel="noreferrer">R&amp;D</a></p>',
    ],
    ['<javascript:alert(1)|the list>', '<p>the list</p>'],
    ['said:\n&gt; 18 of\n> 12\nso', '<p>said:</p><blockquote>18 of\n12</blockquote><p>so</p>'],
    ['before ```18 *of*\n  12``` after', '<p>before</p><pre>18 *of*\n  12</pre><p>after</p>'],
    ['<b onclick="x">', '<p>b onclick="x"</p>'],
  ])('%j', async (typed, expected) => {
    expect(await mrkdwn(typed)).toBe(expected);
  });

  it('as read aloud has plain words only', async () => {
    const spoken = await markup(
      'mrkdwn',
      'spokenText',
      '<@UADA>: 18 &lt; 20, <https://harrowmere.example|the list>',
      names,
    );
    expect(spoken).toBe('@Ada: 18 &lt; 20, the list');
  });
});
