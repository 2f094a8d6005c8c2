import type { Routes } from '@angular/router';
import { DataDictionaryPage } from './data-dictionary-page';

export default [{ path: '', component: DataDictionaryPage }] satisfies Routes;
