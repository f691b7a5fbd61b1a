/// <reference types="astro/client" />

declare namespace App {
  interface Locals {
    /** Who is signed in on this browser. */
    person: import('./server/sign-in/sessions').SignedIn | null;
    /** The public id of the session of this request. */
    sessionId: string | null;
    standing: import('./server/access/memberships').Standing | null;
    requestId: string;
    /** The client's address, as the front determined it. */
    clientAddress: string;
    /** What a form that came with this request held, without secrets: shown again where it was not accepted. */
    typed: Readonly<Record<string, string>>;
    /** Set by a page that may be kept: the name of all that it was made from. */
    pageKey?: string;
  }
}
