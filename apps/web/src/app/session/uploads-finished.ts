import { inject } from '@angular/core';
import type { CanDeactivateFn } from '@angular/router';
import { Ask } from '../ui/ask/ask';

/** A page that may have files under way. */
export interface HasUploads {
  unfinishedUploads(): number;
}

/** Asks before the page is left while files are under way: leaving stops them. */
export const uploadsFinished: CanDeactivateFn<HasUploads> = (page) => {
  const count = page.unfinishedUploads();
  if (count === 0) return true;
  return inject(Ask).confirm({
    title: 'Leave while clips are uploading?',
    words: `${count === 1 ? 'One file is' : `${count} files are`} not uploaded yet and would have to be sent again.`,
    action: 'Leave and stop them',
    refuse: 'Stay',
  });
};
