import { nameBookOf } from '../../schemas/market-names';
import { PLANT_NAMES } from './plants';
import { TECHNICAL_NAMES } from './technical';
import { US_COLOURS } from './us-colours';

/** The names that markets print beyond the glossary. */
export const NAME_BOOK = nameBookOf({ plants: PLANT_NAMES, technical: TECHNICAL_NAMES, colours: US_COLOURS });
