import { execFileSync } from 'node:child_process';
import { expect, test } from 'vitest';
import { uploadLine } from '../../../src/features/teams/tokens/token-words.ts';

test('the line for a shell hands curl the token, the file and the address, each as one word', () => {
  const line = uploadLine({
    origin: 'https://muslin.example',
    path: '/api/teams/t/weather-files',
    token: 'muslin_a-b_C',
  });
  // A shell splits it; printf prints each word on a line.
  const words = execFileSync('/bin/sh', ['-c', line.replace(/^curl/, "printf '%s\\n'")], { encoding: 'utf8' });
  expect(words.trim().split('\n')).toEqual([
    '-H',
    'Authorization: Bearer muslin_a-b_C',
    '-F',
    'file=@year.epw',
    'https://muslin.example/api/teams/t/weather-files',
  ]);
});
