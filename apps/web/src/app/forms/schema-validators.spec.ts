import { api } from '@tollgate/contracts';
import { formOf, requestOf } from './schema-validators';
import { messageOf } from './server-errors';

describe('a form over a schema', () => {
  it('says what the schema says of a field', () => {
    const form = formOf(api.boardCreate, { name: '', description: '' });
    expect(messageOf(form.controls.name)).toBe('Name must not be empty.');
  });

  it('accepts what the schema accepts', () => {
    const form = formOf(api.boardCreate, { name: 'Quay', description: '' });
    expect(form.valid).toBe(true);
  });

  it('takes an empty field for left out where the schema allows that', () => {
    const form = formOf(api.revisionCreate, { letter: '', releaseOn: '', copyFrom: '' });
    expect(form.valid).toBe(true);
    expect(requestOf(api.revisionCreate, form)).toEqual({});
  });

  it('still refuses what is written into an optional field', () => {
    const form = formOf(api.revisionCreate, { letter: 'seven' });
    expect(messageOf(form.controls.letter)).toContain('capital letters');
  });

  it('sends the output of the schema, not the text as typed', () => {
    const form = formOf(api.signIn, { email: ' Noor@Example.com ', password: 'long enough words' });
    expect(requestOf(api.signIn, form)).toEqual({ email: 'noor@example.com', password: 'long enough words' });
  });

  it('refuses a field the schema does not have', () => {
    expect(() => formOf(api.signIn, { nickname: '' })).toThrow('nickname');
  });
});
