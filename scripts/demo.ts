import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { loadActor } from '../src/lib/server/auth/load-actor';
import type { Actor } from '../src/lib/server/access/actor';
import { closePool } from '../src/lib/server/db/pool';
import { addClient, addPerson } from '../src/lib/server/services/people';
import { assignAssessor } from '../src/lib/server/services/product-details';
import { createProduct } from '../src/lib/server/services/products';
import { closeBucket } from '../src/lib/server/storage/bucket';
import { seedEvidence } from './demo/evidence';
import { firstAdministrator, type Account } from './demo/bootstrap';
import { seedCopies } from './demo/copies';
import { seedFormulas, seedMaterials } from './demo/laboratory';
import { DEMO_CLIENTS, DEMO_PASSWORD, DEMO_PEOPLE } from './demo/people';
import { DEMO_PRODUCTS } from './demo/products';

/** The demo goes through the services, so that it obeys every rule that a person must obey. */
async function seedDemo(): Promise<readonly Account[]> {
	const administrator = DEMO_PEOPLE.find(({ roles }) => roles.includes('administrator'));
	if (!administrator) throw new Error('the demo needs an administrator');
	const admin = await firstAdministrator({ ...administrator, password: DEMO_PASSWORD });
	if (!admin) throw new Error('the workspace has an administrator already; npm run reset starts over');
	const clients = new Map<string, string>();
	for (const name of DEMO_CLIENTS) clients.set(name, await addClient(admin, name));
	const actors = new Map<string, Actor>();
	for (const person of DEMO_PEOPLE.filter((each) => each !== administrator)) {
		const { name, email, roles } = person;
		const clientId = person.client ? (clients.get(person.client) ?? '') : '';
		const id = await addPerson(admin, { name, email, roles: [...roles], clientId, password: DEMO_PASSWORD });
		const actor = await loadActor(id);
		if (!actor) continue;
		actors.set(person.client ?? name, actor);
		for (const role of roles) actors.set(role, actor);
	}
	const formulator = actors.get('formulator');
	const officer = actors.get('officer');
	const assessor = actors.get('assessor');
	if (!formulator || !officer || !assessor) throw new Error('the demo needs a formulator, an officer and an assessor');
	await seedMaterials(formulator);
	await seedFormulas(formulator);
	for (const { client, assessed, ...product } of DEMO_PRODUCTS) {
		const slug = await createProduct(officer, { ...product, clientId: clients.get(client) ?? '' });
		if (assessed) await assignAssessor(officer, slug, assessor.personId);
	}
	const [pell, quay] = [actors.get('Pell & Fennick'), actors.get('Harrow Quay')];
	if (!pell || !quay) throw new Error('the demo needs the people of two clients');
	await seedCopies({ officer, pell, quay });
	await seedEvidence(officer, formulator);
	return DEMO_PEOPLE.map(({ name, email, roles, client }) => ({
		name,
		email,
		password: DEMO_PASSWORD,
		roles: client ? ['client'] : roles
	}));
}

async function seedEmpty(): Promise<readonly Account[]> {
	const email = process.env['COSTMARY_ADMIN_EMAIL'];
	const password = process.env['COSTMARY_ADMIN_PASSWORD'];
	if (!email || !password)
		throw new Error('COSTMARY_ADMIN_EMAIL and COSTMARY_ADMIN_PASSWORD name the first administrator');
	const account = { email, password, name: 'Administrator' };
	await firstAdministrator(account);
	return [{ ...account, roles: ['administrator'] }];
}

async function main(): Promise<void> {
	const accounts = process.argv.includes('--empty') ? await seedEmpty() : await seedDemo();
	const folder = process.env['COSTMARY_DATA'];
	if (folder) await writeFile(join(folder, 'demo-accounts.json'), JSON.stringify(accounts, null, '\t'));
}

main()
	.catch((error: unknown) => {
		console.error(error);
		process.exitCode = 1;
	})
	.finally(async () => {
		closeBucket();
		await closePool();
	});
