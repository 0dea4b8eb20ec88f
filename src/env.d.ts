/// <reference types="astro/client" />

declare namespace App {
  interface Locals {
    /** Who is asking, judged from the database for this request; null for nobody. */
    asker: import('./server/access/asker.ts').Asker | null;
    requestId: string;
    theme: 'light' | 'dark';
  }
}
