/// <reference types="astro/client" />

declare namespace App {
  interface Locals {
    site: import('./server/site').Site;
    /** who is signed in; undefined on the signed-out pages */
    person: import('./auth/person').Person | undefined;
  }
}
