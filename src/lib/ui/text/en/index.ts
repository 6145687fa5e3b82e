import { account } from './account';
import { answers, limits } from './answers';
import { batch } from './batch';
import { claims } from './claims';
import { common } from './common';
import { compare } from './compare';
import { counter } from './counter';
import { door } from './door';
import { errors } from './errors';
import { evidence } from './evidence';
import { family, impact } from './family';
import { file } from './file';
import { formulas } from './formulas';
import { label } from './label';
import { materialImport } from './material-import';
import { materials } from './materials';
import { people } from './people';
import { productDetails } from './product-details';
import { composition, list, productFormula, products } from './products';
import { auditTrail, desk, rules } from './rules';
import { shell } from './shell';
import { trials } from './trials';

/** Every sentence of the product by code, one file for each area. Another language satisfies `typeof en`. */
export const en = {
	common,
	shell,
	door,
	errors,
	account,
	answers,
	limits,
	batch,
	claims,
	compare,
	counter,
	evidence,
	family,
	impact,
	file,
	formulas,
	label,
	materials,
	materialImport,
	people,
	products,
	list,
	composition,
	productFormula,
	productDetails,
	auditTrail,
	desk,
	rules,
	trials
};
