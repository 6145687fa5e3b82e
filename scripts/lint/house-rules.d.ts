import type { Linter } from 'eslint';

// The rules walk syntax trees of three parsers that share no types, so they are plain JavaScript, held by their tests.
export const houseRules: Linter.Config[];
