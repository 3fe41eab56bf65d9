import { createRequestKeys, randomKey } from '@/shared/client/api/use-request-key';

function counted() {
  let count = 0;
  return createRequestKeys(() => `key-${(count += 1)}`);
}

describe('the key of a request', () => {
  it('stays the same while the content does', () => {
    const keys = counted();
    expect([keys.keyFor({ a: 1 }), keys.keyFor({ a: 1 })]).toEqual(['key-1', 'key-1']);
  });

  it('changes with the content', () => {
    const keys = counted();
    expect([keys.keyFor({ a: 1 }), keys.keyFor({ a: 2 })]).toEqual(['key-1', 'key-2']);
  });

  it('is a new one after success', () => {
    const keys = counted();
    keys.keyFor({ a: 1 });
    keys.done();
    expect(keys.keyFor({ a: 1 })).toBe('key-2');
  });

  it('has the form that the server takes', () => {
    expect(randomKey()).toMatch(/^[\w-]{8,100}$/);
    expect(randomKey()).not.toBe(randomKey());
  });
});
