import type { AuditChoices, AuditEntry } from '#shared/schemas/audit.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import { getAudit, getAuditChoices, type AuditFilter } from 'src/api/audit.ts';

/** The part of the audit log that is shown, newest first. */
export const useAuditStore = defineStore('audit', () => {
  const entries = ref<AuditEntry[]>([]);
  const next = ref<number | null>(null);
  const choices = ref<AuditChoices>({ actions: [], people: [], buys: [] });
  let asked = 0;

  async function loadChoices(club: string) {
    choices.value = await getAuditChoices(club);
  }

  /** The newest page for a filter; an answer that a newer question overtook is dropped. */
  async function load(club: string, filter: AuditFilter) {
    const mine = ++asked;
    const page = await getAudit(club, filter, null);
    if (mine !== asked) return;
    entries.value = page.entries;
    next.value = page.next;
  }

  async function loadOlder(club: string, filter: AuditFilter) {
    const mine = asked;
    const page = await getAudit(club, filter, next.value);
    if (mine !== asked) return;
    entries.value = [...entries.value, ...page.entries];
    next.value = page.next;
  }

  return { entries, next, choices, load, loadOlder, loadChoices };
});
