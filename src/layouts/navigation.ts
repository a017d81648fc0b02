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

type Place = { name: string; label: string; icon?: string; under?: Place[] };

const places: Place[] = [
  { name: 'buys', label: 'Buys', icon: mdiShoppingOutline },
  { name: 'ledger', label: 'Ledger', icon: mdiBookOpenOutline },
  { name: 'notices', label: 'Notices', icon: mdiBellOutline },
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

  function open(place: Place, club: string): NavItem[] {
    const under = (place.under ?? []).flatMap((child) => open(child, club));
    const target = under[0]?.to.name ?? place.name;
    const record = router.getRoutes().find(({ name }) => name === target);
    const roles = record?.meta.roles;
    if (!record || (roles && !roles.some((role) => session.hasRole(role)))) return [];
    const lit = route.meta.nav === place.name || under.some((child) => child.lit);
    const to = { name: target, params: { club } };
    return [{ name: place.name, label: place.label, icon: place.icon ?? '', lit, to, under }];
  }

  const items = computed(() => {
    const club = session.currentClub?.clubSlug;
    return club ? places.flatMap((place) => open(place, club)) : [];
  });
  const tabs = computed(() => items.value.find((item) => item.lit)?.under ?? []);

  return { items, tabs };
}
