import type {
  AccountReply,
  ChangeEmailBody,
  ChangePasswordBody,
  SignUpBody,
} from '#shared/schemas/accounts.ts';
import type { DemoPerson } from '#shared/schemas/session.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import * as accounts from 'src/api/accounts.ts';
import { patchOwnName, postLeave } from 'src/api/members.ts';
import { useSessionStore } from 'src/stores/session.ts';

/** One's own account: signing up, links from mails, and what stands on the account's page. */
export const useAccountStore = defineStore('account', () => {
  const session = useSessionStore();
  const account = ref<AccountReply | null>(null);
  const demoPeople = ref<DemoPerson[]>([]);

  async function load() {
    account.value = await accounts.getAccount();
  }

  async function loadDemoPeople() {
    demoPeople.value = (await accounts.getDemoPeople()).people;
  }

  async function signUp(body: SignUpBody) {
    session.receive(await accounts.postAccount(body));
  }

  async function setPassword(token: string, password: string) {
    session.receive(await accounts.postNewPassword(token, password));
  }

  async function rename(displayName: string) {
    await accounts.patchAccount(displayName);
    await Promise.all([load(), session.load()]);
  }

  async function renameIn(club: string, displayName: string) {
    await patchOwnName(club, displayName);
    await load();
  }

  async function leave(club: string) {
    await postLeave(club);
    await Promise.all([load(), session.load()]);
  }

  async function changePassword(body: ChangePasswordBody) {
    await accounts.putPassword(body);
    await load();
  }

  async function changeEmail(body: ChangeEmailBody) {
    await accounts.postEmail(body);
    await load();
  }

  async function confirmEmail(token: string) {
    const { email } = await accounts.postEmailConfirmation(token);
    if (session.signedIn) await session.load();
    return email;
  }

  async function signOutEverywhere() {
    await accounts.deleteSessions();
    forget();
  }

  async function remove(password: string) {
    await accounts.deleteAccount(password);
    forget();
  }

  function forget() {
    account.value = null;
    session.clear();
  }

  return {
    account,
    demoPeople,
    load,
    loadDemoPeople,
    signUp,
    requestReset: accounts.postReset,
    readReset: accounts.getReset,
    setPassword,
    readEmailConfirmation: accounts.getEmailConfirmation,
    confirmEmail,
    rename,
    renameIn,
    leave,
    changePassword,
    changeEmail,
    signOutEverywhere,
    remove,
  };
});
