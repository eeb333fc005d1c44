/** The pages that every look at "all pages" walks over, each as somebody who may open it. */
import { consolePages } from '@/lib/auth/permissions';
import type { World } from '../support/world';

export interface WalkedPage {
  readonly path: string;
  readonly signedIn: boolean;
}

export function allPages({ callId }: World): WalkedPage[] {
  return [
    ...['/', '/sign-in', '/problems', '/problems/invalid-input', '/reference', '/methods', '/methods/telegrapher-propagation', '/methods/no-such-method', '/verification?calculation=lines/secondary-constants&q=telephone', '/no-such-page'].map((path) => ({ path, signedIn: false })),
    ...[...consolePages.map(({ path }) => path), `/console/calls/${callId}`, '/console/calls?status=5xx', '/console/usage?by=key&days=7'].map((path) => ({ path, signedIn: true })),
  ];
}
