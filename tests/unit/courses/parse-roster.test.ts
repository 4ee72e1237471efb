import { describe, expect, it } from 'vitest';
import { parseRoster } from '@/app/(app)/courses/[courseId]/_components/parse-roster';

const people = (text: string) => parseRoster(text).map(({ name, email }) => `${name} <${email}>`);
const problems = (text: string) => parseRoster(text).map(({ line, problem }) => [line, problem]);

describe('parseRoster', () => {
  it.each([
    ['commas', 'Ada Low,ada@x.example\nBen High,BEN@x.example'],
    ['semicolons and a header', 'Name;E-mail\nAda Low;ada@x.example\nBen High;ben@x.example'],
    ['tabs, the e-mail first', 'ada@x.example\tAda Low\nben@x.example\tBen High'],
    ['mail addresses with names', 'Ada Low <ada@x.example>\nBen High <ben@x.example>'],
    ['quotes, a byte order mark, Windows line ends, empty lines', '\uFEFF"Ada Low",ada@x.example\r\n\r\n"Ben High",ben@x.example\r\n'],
    ['first and last name in columns of their own', 'email,first,last\nada@x.example,Ada,Low\nben@x.example,Ben,High'],
  ])('reads a list with %s', (_kind, text) => {
    expect(people(text)).toEqual(['Ada Low <ada@x.example>', 'Ben High <ben@x.example>']);
  });

  it('reads bare e-mails', () => {
    expect(people('ada@x.example\nben@x.example')).toEqual([' <ada@x.example>', ' <ben@x.example>']);
  });

  it('says for each line what is wrong with it, by its number in the list', () => {
    expect(problems('Name,E-mail\nAda Low,ada@x.example\nBen High\nCleo,cleo@x\nAda again,ADA@x.example')).toEqual([
      [2, null],
      [3, 'There is no e-mail in this line.'],
      [4, 'The e-mail is not complete.'],
      [5, 'This e-mail is in the list already.'],
    ]);
  });

  it('finds nobody in nothing', () => {
    expect(parseRoster('')).toEqual([]);
    expect(parseRoster(' \n\n')).toEqual([]);
  });
});
