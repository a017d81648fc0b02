import 'vue-router';

declare module 'vue-router' {
  interface RouteMeta {
    /** Who the page is for: signed in, signed out, or anyone. */
    needs: 'session' | 'guest' | 'none';
    layout: 'main' | 'guest' | 'print';
    /** The document's title until the page names its own by `useTitle`. */
    title: string;
    /** The navigation item that is lit on this page, by its route name. */
    nav?: string;
    /** Shown in the navigation only to members with one of these roles. */
    roles?: ('organiser' | 'treasurer' | 'steward')[];
  }
}
