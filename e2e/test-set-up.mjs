/** What the tests need on the machine beside what the product needs. */
import { existsSync } from 'node:fs';
import { ensureDebianPackages, ensureNodeModules } from '../database/install.mjs';
import { postgresPackage } from '../database/product.mjs';

const program = (/** @type {string} */ name, /** @type {string} */ from) => ({
  package: from,
  presentIf: () => existsSync(`/usr/bin/${name}`),
});

const packages = [
  postgresPackage,
  program('chromium', 'chromium'),
  program('soffice', 'libreoffice-writer-nogui'),
  // The spreadsheet part of it is a package of its own.
  { package: 'libreoffice-calc-nogui', presentIf: () => existsSync('/usr/lib/libreoffice/program/libsclo.so') },
  program('units', 'units'),
  program('xmllint', 'libxml2-utils'),
  program('pdftotext', 'poppler-utils'),
];

/** Installs npm packages, and Debian packages when we are root; refuses with the command to give otherwise. @param {(line: string) => void} say */
export async function setUp(say) {
  await ensureNodeModules(say);
  await ensureDebianPackages(packages, say);
}
