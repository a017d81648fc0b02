import {
  mdiAccountMultipleOutline,
  mdiBellOutline,
  mdiBookOpenOutline,
  mdiShoppingOutline,
} from '@quasar/extras/mdi-v7';
import { computed } from 'vue';
import { useRoute, useRouter } from 'vue-router';
import { useSessionStore } from 'src/stores/session.ts';

export type NavItem = {
  name: string;
  label: string;
  icon: string;
  lit: boolean;
  to: { name: string; params: { club: string } };
  under: NavItem[];
};

/** `former`: also for who left the club, where their own buys, books and notices stay theirs to read. */
type Place = { name: string; label: string; icon?: string; former?: boolean; under?: Place[] };

const places: Place[] = [
  { name: 'buys', label: 'Buys', icon: mdiShoppingOutline, former: true },
  { name: 'ledger', label: 'Ledger', icon: mdiBookOpenOutline, former: true },
  { name: 'notices', label: 'Notices', icon: mdiBellOutline, former: true },
  {
    name: 'club',
    label: 'Club',
    icon: mdiAccountMultipleOutline,
    under: [
      { name: 'members', label: 'Members' },
      { name: 'salts', label: 'Salts' },
      { name: 'suppliers', label: 'Suppliers' },
      { name: 'shelf', label: 'Shelf' },
      { name: 'precursors', label: 'Records' },
      { name: 'settings', label: 'Settings' },
      { name: 'audit', label: 'Audit log' },
    ],
  },
];

/** What this member can go to in the club at hand, with the place where they are lit. */
export function useNavigation() {
  const router = useRouter();
  const route = useRoute();
  const session = useSessionStore();

  function item(place: Place, club: string): NavItem[] {
    const under = (place.under ?? []).flatMap((child) => item(child, club));
    const target = under[0]?.to.name ?? place.name;
    const record = router.getRoutes().find(({ name }) => name === target);
    const roles = record?.meta.roles;
    if (!record || (roles && !roles.some((role) => session.hasRole(role)))) return [];
    const lit = route.meta.nav === place.name || under.some((child) => child.lit);
    const to = { name: target, params: { club } };
    return [{ name: place.name, label: place.label, icon: place.icon ?? '', lit, to, under }];
  }

  const items = computed(() => {
    const club = session.currentClub;
    if (!club) return [];
    const open = places.filter(({ former }) => former || club.status === 'active');
    return open.flatMap((place) => item(place, club.clubSlug));
  });
  const tabs = computed(() => items.value.find((item) => item.lit)?.under ?? []);

  return { items, tabs };
}
