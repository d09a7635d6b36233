import { jest } from '@jest/globals';

// Against hangs only: a busy machine is no failure.
jest.setTimeout(120_000);
