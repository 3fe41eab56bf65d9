/** Runs before each client test file: DOM matchers, and a browser storage that starts empty. */
import '@testing-library/jest-dom';

beforeEach(() => {
  globalThis.localStorage?.clear();
  globalThis.sessionStorage?.clear();
});
