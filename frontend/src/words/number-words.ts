const words = [
  'no',
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
  'thirteen',
] as const;

/** A whole number in words up to thirteen, in figures beyond; zero is 'no', as in 'no sessions'. */
export function numberWord(count: number): string {
  return words[count] ?? String(count);
}

/** A number in words with its noun: 'one day', 'six days'. */
export function counted(count: number, one: string, many = `${one}s`): string {
  return `${numberWord(count)} ${count === 1 ? one : many}`;
}

/** The text with its first letter large, for the start of a sentence. */
export function sentenceCase(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

/** Things in a row as English says them: 'one', 'one and two', 'one, two and three'. */
export function listed(items: readonly string[], last: 'and' | 'or' = 'and'): string {
  if (items.length < 2) return items[0] ?? '';
  return `${items.slice(0, -1).join(', ')} ${last} ${items[items.length - 1]}`;
}
