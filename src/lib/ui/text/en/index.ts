import { common } from './common';
import { door } from './door';
import { errors } from './errors';
import { evidence } from './evidence';
import { formulas } from './formulas';
import { materials } from './materials';
import { people } from './people';
import { composition, list, productFormula, products } from './products';
import { shell } from './shell';

/** Every sentence of the product by code, one file for each area. Another language satisfies `typeof en`. */
export const en = {
	common,
	shell,
	door,
	errors,
	evidence,
	formulas,
	materials,
	people,
	products,
	list,
	composition,
	productFormula
};
