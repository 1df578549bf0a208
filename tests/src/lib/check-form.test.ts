import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { AppError } from '../../../shared/errors.ts';
import { browserWords } from '../../../src/lib/browser-words.ts';
import { checkForm, problemsOf, sentenceOf } from '../../../src/lib/check-form.ts';

const schema = z.strictObject({ email: z.email(), name: z.string().trim().min(1) });

describe('checkForm', () => {
  it('gives the data as the schema has them', () => {
    expect(checkForm(schema, { email: 'a@b.example', name: ' Ann ' })).toEqual({
      data: { email: 'a@b.example', name: 'Ann' },
      problems: null,
    });
  });

  it('says what is wrong with every field, in the words given for it', () => {
    const { problems } = checkForm(schema, { email: 'no', name: '' }, { email: 'An address is needed.' });
    expect(problems?.email).toBe('An address is needed.');
    expect(problems?.name?.length).toBeGreaterThan(0);
  });
});

describe('problemsOf and sentenceOf', () => {
  it('take the issues and the sentence of the server', () => {
    const error = new AppError('conflict', 'There is one already.', {
      issues: [{ path: 'slug', message: 'taken' }, { message: 'no field' }],
    });
    expect(problemsOf(error)).toEqual({ slug: 'taken' });
    expect(sentenceOf(error)).toBe('There is one already.');
  });

  it('say nothing where nothing is wrong, and do not show what is inside', () => {
    expect(sentenceOf(null)).toBeNull();
    expect(sentenceOf(new TypeError('x is undefined'))).not.toContain('undefined');
  });
});

describe('browserWords', () => {
  it('names browser and system', () => {
    expect(
      browserWords(
        'Mozilla/5.0 (X11; Linux x86_64) AppleWebKit/537.36 (KHTML, like Gecko) Chrome/140.0 Safari/537.36',
      ),
    ).toBe('Chrome on Linux');
    expect(
      browserWords('Mozilla/5.0 (Macintosh; Intel Mac OS X 14.4; rv:124.0) Gecko/20100101 Firefox/124.0'),
    ).toBe('Firefox on macOS');
    expect(
      browserWords(
        'Mozilla/5.0 (Windows NT 10.0; Win64; x64) AppleWebKit/537.36 Chrome/140.0 Safari/537.36 Edg/140.0',
      ),
    ).toBe('Edge on Windows');
  });

  it('shows what it cannot read as it came, and says where nothing came', () => {
    expect(browserWords('node')).toBe('node');
    expect(browserWords(null)).toBe('unknown browser');
  });
});
