import type { ProductInput } from '../../src/lib/schemas/product';

export interface DemoProduct extends Omit<ProductInput, 'clientId'> {
	readonly client: string;
	/** Whether the safety assessor of the demo is assigned to it. */
	readonly assessed: boolean;
}

const adult = { ages: ['adult' as const], spray: 'none' as const, originCountry: '' };

export const DEMO_PRODUCTS: readonly DemoProduct[] = [
	{
		client: 'Pell & Fennick',
		name: 'Nightfold Cream',
		brandName: 'Nightfold',
		functionText: 'Night face cream',
		productType: 'face-cream',
		stay: 'leave-on',
		sites: ['face'],
		...adult,
		formulaCode: 'F-0012',
		clientCode: 'PF-NC-07',
		assessed: true,
		responsibleName: 'Pell & Fennick Ltd',
		responsibleAddress: '7 Example Quay, Dublin, Ireland',
		pack: { name: 'Carton with jar', size: '50', unit: 'ml', gtin: '' }
	},
	{
		client: 'Harrow Quay',
		name: 'Tidewell Shampoo',
		brandName: 'Tidewell',
		functionText: 'Shampoo',
		productType: 'shampoo',
		stay: 'rinse-off',
		sites: ['hair', 'scalp'],
		...adult,
		formulaCode: 'F-0020',
		clientCode: 'HQ-11',
		assessed: true,
		responsibleName: 'Harrow Quay GmbH',
		responsibleAddress: 'Musterkai 3, Hamburg, Germany',
		pack: { name: 'Tube', size: '200', unit: 'ml', gtin: '' }
	},
	{
		client: 'Marlpit Nursery',
		name: 'Pebblewick Kids Wash',
		brandName: 'Pebblewick',
		functionText: 'Wash for children',
		productType: 'shower-gel',
		stay: 'rinse-off',
		sites: ['body', 'hair'],
		...adult,
		ages: ['children-3-to-12'],
		formulaCode: 'F-0031',
		clientCode: 'MN-02',
		assessed: false,
		responsibleName: 'Marlpit Nursery SARL',
		responsibleAddress: '12 rue Exemple, Lille, France',
		pack: { name: 'Bottle with pump', size: '250', unit: 'ml', gtin: '' }
	}
];
