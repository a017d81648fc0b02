import type { RouteRecordRaw } from 'vue-router';

export const saltsRoutes: RouteRecordRaw[] = [];
