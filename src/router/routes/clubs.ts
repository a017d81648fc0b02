import type { RouteRecordRaw } from 'vue-router';

export const clubsRoutes: RouteRecordRaw[] = [];
