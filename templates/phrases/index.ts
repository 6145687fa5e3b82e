import type { PrintLanguage } from '../pdf/types';
import { en, type Phrases } from './en';

const LANGUAGES: Readonly<Record<PrintLanguage, Phrases>> = { en };

export const phrasesIn = (language: PrintLanguage): Phrases => LANGUAGES[language];
export type { Phrases };
