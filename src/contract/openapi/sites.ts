import { EvidenceInput, EvidenceList, EvidenceQuery, EvidenceRemoved, SavedEvidence } from '../evidence.ts';
import {
  ChangedSite,
  SavedSite,
  Site,
  SiteInput,
  SiteList,
  SiteListQuery,
  SitePatch,
  SitesRemoval,
  SitesRemoved,
  SitesRestoration,
  SitesRestored,
} from '../site.ts';
import {
  UploadCommit,
  UploadCommitted,
  UploadList,
  UploadListQuery,
  UploadOptions,
  UploadPreview,
  UploadUndone,
} from '../upload.ts';
import { z } from '../zod.ts';
import type { Operations } from './operation.ts';

const STUDY = '/api/v1/studies/{studyId}';

const PostedFile = UploadOptions.extend({
  file: z.string().meta({ format: 'binary', description: 'CSV, up to 5 MB and 10,000 rows' }),
}).meta({ id: 'PostedFile' });

const PostedEvidence = EvidenceInput.extend({
  file: z
    .string()
    .meta({ format: 'binary', description: 'PDF, PNG, JPEG, WebP or CSV by its bytes, up to 10 MB' }),
}).meta({ id: 'PostedEvidence' });

export const siteOperations: Operations = {
  [`${STUDY}/sites`]: {
    get: { summary: 'Candidate sites', query: SiteListQuery, answer: SiteList },
    post: { summary: 'Add a site', body: SiteInput, answer: SavedSite, status: 201 },
  },
  [`${STUDY}/sites/{siteId}`]: {
    get: { summary: 'A site', answer: Site },
    patch: { summary: 'Change a site', body: SitePatch, answer: ChangedSite, versioned: true },
    delete: { summary: 'Remove a site; restore brings it back', answer: SitesRemoved, versioned: true },
  },
  [`${STUDY}/sites/remove`]: {
    post: { summary: 'Remove several sites at once', body: SitesRemoval, answer: SitesRemoved },
  },
  [`${STUDY}/sites/restore`]: {
    post: { summary: 'Bring removed sites back', body: SitesRestoration, answer: SitesRestored },
  },
  [`${STUDY}/sites.csv`]: {
    get: {
      summary: 'Sites with their entered figures; can be uploaded again',
      answer: { type: 'text/csv', description: 'A heading line and a row a site' },
    },
  },
  [`${STUDY}/sites.geojson`]: {
    get: {
      summary: 'Sites as a feature collection (RFC 7946)',
      answer: { type: 'application/geo+json', description: 'A point a site' },
    },
  },
  [`${STUDY}/uploads`]: {
    get: { summary: 'Uploaded files, newest first', query: UploadListQuery, answer: UploadList },
    post: {
      summary: 'Read a file of candidates; nothing is written to the sites',
      form: PostedFile,
      answer: UploadPreview,
      status: 201,
    },
  },
  [`${STUDY}/uploads/{uploadId}`]: {
    get: { summary: 'What an uploaded file reads as now', answer: UploadPreview },
    delete: { summary: 'Undo a committed upload', answer: UploadUndone },
  },
  [`${STUDY}/uploads/{uploadId}/commit`]: {
    post: {
      summary: 'Write rows to the sites, in one transaction',
      body: UploadCommit,
      answer: UploadCommitted,
    },
  },
  [`${STUDY}/uploads/{uploadId}/file`]: {
    get: {
      summary: 'The original bytes',
      answer: { type: 'application/octet-stream', description: 'The file as it came' },
    },
  },
  [`${STUDY}/evidence`]: {
    get: {
      summary: 'Evidence files of entered figures, newest first',
      query: EvidenceQuery,
      answer: EvidenceList,
    },
    post: {
      summary: 'Keep a file that supports an entered figure',
      form: PostedEvidence,
      answer: SavedEvidence,
      status: 201,
    },
  },
  [`${STUDY}/evidence/{evidenceId}`]: {
    delete: { summary: 'Take an evidence file away', answer: EvidenceRemoved },
  },
  [`${STUDY}/evidence/{evidenceId}/file`]: {
    get: {
      summary: 'The original bytes, as an attachment',
      answer: { type: 'application/octet-stream', description: 'The file as it came' },
    },
  },
};
