// Version 1 of the database: sheets with their text and steps, what closed pages left behind, the trash, own templates, files on the disk, and the rest.

import type { Upgrade } from '../database.ts';

export const to1: Upgrade = (db) => {
  db.createObjectStore('sheets', { keyPath: 'id' });
  db.createObjectStore('texts', { keyPath: 'id' });
  db.createObjectStore('steps', { keyPath: ['sheet', 'n'] });
  db.createObjectStore('trash', { keyPath: 'id' });
  db.createObjectStore('templates', { keyPath: 'id' });
  db.createObjectStore('left', { keyPath: 'writer' });
  db.createObjectStore('files', { keyPath: 'id' });
  db.createObjectStore('meta', { keyPath: 'key' });
};
