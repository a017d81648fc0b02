import type { RouteRecordRaw } from 'vue-router';

export const buysRoutes: RouteRecordRaw[] = [];
