import { downloadAttachment } from '#contracts/attachments.ts';
import { removeDataSheet, uploadDataSheet } from '#contracts/coatings.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import { keepDataSheetFile, removeDataSheetFile } from '../services/keep-data-sheet-file.ts';
import { readAttachment } from '../services/read-attachment.ts';
import type { Routes } from './route.ts';

/** Files that people put in. Whoever sees the shop may read them. */
export function attachmentRoutes(routes: Routes, deps: Deps): void {
  routes.upload(uploadDataSheet, may.keepSheets, ['application/pdf'], ({ actor, params, file }) =>
    keepDataSheetFile(deps, actor, params.coatingId, file),
  );
  routes.shop(removeDataSheet, may.keepSheets, ({ actor, params }) =>
    removeDataSheetFile(deps, actor, params.coatingId),
  );
  routes.download(downloadAttachment, may.seeShop, ({ actor, params }) =>
    readAttachment(deps, actor, params.attachmentId),
  );
}
