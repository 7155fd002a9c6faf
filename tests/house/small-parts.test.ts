import { describe, expect, test } from 'vitest';
import { parseEnv } from '../../scripts/lib/env-file.mjs';
import { collectNotices, fits } from '../../scripts/lib/licences.mjs';
import { satisfies } from '../../scripts/lib/node-version.mjs';

describe('.env', () => {
  test('gives names and values, quoted or not', () => {
    const text = `# a comment\n\nPORT=5180\nexport HOST = 0.0.0.0 # for the bay\nMAIL_FROM="Ovenbird <paint@shop.example>"\r\nEMPTY=\nSECRET='a # b=c'\n`;
    expect(parseEnv(text)).toEqual({
      PORT: '5180',
      HOST: '0.0.0.0',
      MAIL_FROM: 'Ovenbird <paint@shop.example>',
      EMPTY: '',
      SECRET: 'a # b=c',
    });
  });

  test('keeps a # inside an address', () => {
    expect(parseEnv('URL=https://x.example/#top')).toEqual({ URL: 'https://x.example/#top' });
  });

  test.each(['PORT 5180', '1PORT=5180', '=5180'])('refuses "%s" by its line', (line) => {
    expect(() => parseEnv(`A=1\n${line}\n`)).toThrow('.env, line 2');
  });
});

describe('the range of Node versions', () => {
  const range = '>=20.19 <21 || >=22.12';
  test.each(['20.19.0', '20.20.2', '22.12.0', '24.1.0'])('takes %s', (version) => {
    expect(satisfies(version, range)).toBe(true);
  });
  test.each(['18.20.8', '20.18.3', '21.7.3', '22.11.0'])('refuses %s', (version) => {
    expect(satisfies(version, range)).toBe(false);
  });
});

describe('licences', () => {
  test.each(['MIT', '(MIT OR EUPL-1.1+)', 'MIT AND ISC', 'GPL-3.0-only'])('%s fits', (licence) => {
    expect(fits(licence)).toBe(true);
  });
  // GPL-2.0-only cannot be combined with version 3: https://www.gnu.org/licenses/gpl-faq.html#AllCompatibility
  test.each(['GPL-2.0-only', 'UNLICENSED', 'MIT AND SSPL-1.0', 'none stated', 'CC-BY-NC-ND-4.0'])(
    '%s does not',
    (licence) => {
      expect(fits(licence)).toBe(false);
    },
  );

  test('every package that is run or shipped has a licence that fits, and its text', () => {
    const notices = collectNotices();
    expect(notices.map(({ name }) => name)).toEqual(
      expect.arrayContaining(['react', 'express', 'pg', '@fontsource/manrope']),
    );
    expect(notices.filter(({ licence, text }) => !fits(licence) || text === '')).toEqual([]);
  });
});
