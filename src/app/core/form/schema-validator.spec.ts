import { FormControl } from '@angular/forms';
import { describe, expect, it } from 'vitest';
import { emailSchema, noteSchema, passwordSchema } from '../../../../shared/contracts/api';
import { validBy } from './schema-validator';

describe('validBy', () => {
  it('says what is wrong in the words of the contract', () => {
    expect(validBy(passwordSchema)(new FormControl('short'))).toEqual({
      fault: 'must have at least 12 characters',
    });
    expect(validBy(emailSchema)(new FormControl('nobody'))).toEqual({ fault: 'must be an e-mail address' });
  });

  it('says of an empty field that it is missing, unless it may be empty', () => {
    expect(validBy(emailSchema)(new FormControl(' '))).toEqual({ fault: 'is missing' });
    expect(validBy(noteSchema)(new FormControl(''))).toBeNull();
  });
});
