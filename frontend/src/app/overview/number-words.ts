const WORDS = [
  'none',
  'one',
  'two',
  'three',
  'four',
  'five',
  'six',
  'seven',
  'eight',
  'nine',
  'ten',
  'eleven',
  'twelve',
];

/** A count as it stands in a sentence: a word up to twelve, digits from there on. */
export function numberWord(count: number): string {
  return WORDS[count] ?? String(count);
}

/** The same text with a capital first letter. */
export function sentenceCase(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
