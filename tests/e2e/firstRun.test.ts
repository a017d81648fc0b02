import { afterAll, beforeAll, beforeEach, describe, expect, it, onTestFailed } from 'vitest';
import { startInstance, type Instance, type Person } from '#tests/support/instance.ts';
import { keepShots } from '#tests/support/keepShots.ts';
import { draftBuy, openBuy } from './acts/draft.ts';
import { choose, dialogOf, saying, textOf, told } from './acts/page.ts';
import { cellSaying, typeInto } from './acts/sheet.ts';

const clubName = 'Harrowfen Aquascapers';
const club = 'harrowfen-aquascapers';
const epsom = 'Epsom salt';

let tarewell: Instance;
let founder: Person, friend: Person;
let link = '';
let buy = '';
let broken = false;

beforeAll(async () => {
  tarewell = await startInstance({ demo: false });
  founder = await tarewell.browse();
  friend = await tarewell.browse();
});
afterAll(() => tarewell?.stop());
beforeEach(({ skip }) => {
  if (broken) skip('an earlier step failed');
  onTestFailed(async () => {
    broken = true;
    await keepShots({ founder, friend });
  });
});

/** The newest mail that waits for an address or went to it. */
async function mailTo(address: string) {
  const [mail] = await tarewell.query<{ subject: string; text_body: string }>(
    'select subject, text_body from outbox where lower(address) = $1 order by created_at desc limit 1',
    [address],
  );
  return mail;
}

async function signUp({ page }: Person, name: string, email: string, act: string) {
  await page.getByLabel('Your name').fill(name);
  await page.getByLabel('E-mail address').fill(email);
  await page.getByLabel('Password', { exact: true }).fill('heron reed lantern');
  await page.getByRole('button', { name: act }).click();
}

describe('an empty installation', () => {
  it('welcomes whoever comes first, who makes an account', async () => {
    const { page } = founder;
    await page.goto('/');
    await page.getByRole('heading', { level: 1, name: 'Welcome to Tarewell' }).waitFor();
    await signUp(founder, 'Maren Tholby', 'maren@harrowfen.example', 'Go on to your club');
    await page.getByRole('heading', { level: 1, name: 'Found a club' }).waitFor();
  });

  it('refuses a bad address of a club at its field, and founds the club then', async () => {
    const { page } = founder;
    await page.getByLabel('Name of the club').fill(clubName);
    const address = page.getByLabel('Address');
    expect(await address.inputValue()).toBe(club);
    await address.fill('no spaces!');
    await page.getByRole('button', { name: 'Found the club' }).click();
    await page.locator('[aria-invalid="true"]').first().waitFor();
    expect(new URL(page.url()).pathname).toBe('/clubs/new');
    await address.fill(club);
    await choose(page, 'Currency', /EUR/, 'EUR');
    await page.getByRole('button', { name: 'Found the club' }).click();
    await page.getByRole('heading', { level: 1, name: `First steps in ${clubName}` }).waitFor();
  });

  it('leads from the first steps to a join link', async () => {
    const { page } = founder;
    await page.getByRole('link', { name: 'Invite' }).click();
    await page.getByRole('button', { name: 'Invite', exact: true }).click();
    const dialog = dialogOf(page);
    await dialog.getByRole('tab', { name: 'By link' }).click();
    await dialog.getByRole('button', { name: 'Make a join link' }).click();
    link = await dialog.getByRole('textbox', { name: 'Join link' }).inputValue();
    expect(link).toMatch(/\/join\/[\w-]{43}$/);
    await dialog.getByRole('button', { name: 'Close' }).click();
  });

  it('lets a second person in once the steward says yes, who is told by mail', async () => {
    const { page } = friend;
    await page.goto(link);
    await page.getByRole('heading', { level: 1, name: `Join ${clubName}` }).waitFor();
    await page.getByRole('link', { name: 'Sign up' }).click();
    await signUp(friend, 'Osric Penhale', 'osric@harrowfen.example', 'Sign up');
    await page.getByRole('button', { name: 'Ask to join' }).click();
    await page.getByRole('heading', { name: `${clubName} will let you in` }).waitFor();
    expect((await mailTo('maren@harrowfen.example'))?.subject).toMatch(
      /Osric Penhale asks to join/,
    );

    await founder.page.reload();
    await founder.page.getByRole('button', { name: 'Let Osric Penhale in' }).click();
    await told(founder.page, 'Osric Penhale is in the club');
    expect((await mailTo('osric@harrowfen.example'))?.subject).toBe(`You are in ${clubName}`);
    // The page that waits goes on by itself.
    await page.getByRole('heading', { level: 1, name: 'Buys' }).waitFor();
    await page.getByText('No buys yet').waitFor();
  });

  it('takes a supplier and an offer', async () => {
    const { page } = founder;
    await page.goto(`/c/${club}/start`);
    await page.getByRole('link', { name: 'Add a supplier' }).click();
    await page.getByRole('button', { name: 'Add a supplier' }).click();
    const dialog = dialogOf(page);
    await dialog.getByLabel('Name').fill('Millrace Minerals');
    await dialog.getByLabel('Price for each order').fill('4.50');
    await dialog.getByRole('button', { name: 'Save the supplier' }).click();
    await page.getByRole('heading', { level: 1, name: 'Millrace Minerals' }).waitFor();
    await page.getByRole('button', { name: 'Add an offer' }).click();
    await choose(dialogOf(page), 'Salt', new RegExp(epsom), epsom);
    await dialogOf(page).getByLabel('One pack holds').fill('5kg');
    await dialogOf(page).getByLabel('Price', { exact: true }).fill('10.40');
    await dialogOf(page).getByRole('button', { name: 'Save the offer' }).click();
    await told(page, 'The offer is saved');
  });

  it('opens its first buy, on which both pledge', async () => {
    buy = await draftBuy(founder.page, club, 'First salts', [epsom]);
    await openBuy(founder.page);
    await expect
      .poll(async () => (await mailTo('osric@harrowfen.example'))?.subject)
      .toMatch(/First salts is open/);
    await friend.page.goto(`/c/${club}/buys/${buy}`);
    await friend.page.waitForURL(/\/sheet/);
    await typeInto(friend.page, epsom, '1.5kg');
    await friend.page.keyboard.press('Enter');
    await cellSaying(founder.page, 'Osric Penhale', epsom, '1500 g').waitFor();
    await typeInto(founder.page, epsom, '500');
    await founder.page.keyboard.press('Enter');
    await cellSaying(friend.page, 'Maren Tholby', epsom, '500 g').waitFor();
    const slip = friend.page.getByRole('region', { name: /^Your share/ });
    // 5 kg for 10.40, shipping 4.50: three quarters of both.
    await expect.poll(() => textOf(slip)).toMatch(saying('You would pay €11.18'));
  });

  it('says that all first steps are done but how to pay, with a quiet console', async () => {
    await founder.page.goto(`/c/${club}/start`);
    await founder.page.getByRole('heading', { name: /^Say how people pay.*to do$/ }).waitFor();
    expect(await founder.page.getByRole('heading', { name: /done$/ }).count()).toBe(3);
    expect(founder.complaints).toEqual([]);
    expect(friend.complaints).toEqual([]);
  });
});
