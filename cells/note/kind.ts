import { defineKind } from '../kind.ts';

export type NoteSettings = {
  readonly text: string;
};

/** Free text: plain Markdown, no HTML, links shown as text. */
export const noteKind = defineKind<NoteSettings, Record<string, never>, null, { readonly text: string }>({
  name: 'note',
  version: 1,
  title: () => 'note',
  offer: 'Write a note',
  takes: {},
  gives: null,
  blind: 'same',
  defaults: () => ({ text: '' }),
  check: () => [],
  compute: (settings) => ({ value: null, detail: { text: settings.text } }),
  sentence: (settings) => [
    {
      key: 'text',
      label: 'text of the note',
      shown: settings.text.trim() === '' ? 'Write a note' : 'Note',
      filled: settings.text.trim() !== '',
      editor: { type: 'text', value: settings.text, long: true, set: (text) => ({ ...settings, text }) },
    },
  ],
  say: ({ detail }) => detail.text,
  record: () => null,
});
