import {
  Criterion,
  CriterionGroup,
  CriterionGroupInput,
  CriterionGroupList,
  CriterionGroupPatch,
  CriterionInput,
  CriterionList,
  CriterionPatch,
} from '../criterion.ts';
import { ListQuery } from '../list.ts';
import { MemberInput, MemberList, MemberPatch, StudyMember } from '../member.ts';
import { MemoQuery } from '../memo.ts';
import { Ranking, RankingQuery } from '../ranking.ts';
import {
  OrbitInput,
  OrbitList,
  OrbitPatch,
  SettingsPatch,
  StudyOrbit,
  StudySettings,
  StudyVehicle,
  StudyVehicleInput,
} from '../requirement.ts';
import { StudyEvaluation, StudyInputs } from '../study-inputs.ts';
import { StudySections } from '../sections.ts';
import { Study, StudyInput, StudyList, StudyListQuery, StudyPatch } from '../study.ts';
import { MemberWeightsList, Weights, WeightsChoice, WeightsInput, WeightsQuery } from '../weights.ts';
import { z } from '../zod.ts';
import type { Operations } from './operation.ts';

const STUDIES = '/api/v1/studies';
const STUDY = `${STUDIES}/{studyId}`;
const Saved = z.object({ revision: z.int(), savedAt: z.iso.datetime() }).meta({ id: 'Saved' });
const EVENTS = {
  type: 'text/event-stream',
  description:
    'Events `change` with studyId, revision and kinds of object, the record’s number as id; `progress` with studyId when its flown ascents moved on; `gap` says that changes may have been missed. Last-Event-ID resumes.',
};

export const studyOperations: Operations = {
  [STUDIES]: {
    get: { summary: 'Your studies, latest change first', query: StudyListQuery, answer: StudyList },
    post: {
      summary: 'Make a study, blank, from the example or as a copy',
      body: StudyInput,
      answer: Study,
      status: 201,
    },
  },
  [STUDY]: {
    get: { summary: 'A study', answer: Study },
    patch: {
      summary: 'Change title, question or decision date; archive or restore',
      body: StudyPatch,
      answer: Study,
      versioned: true,
    },
    delete: { summary: 'Archive: nothing is deleted', answer: Study, versioned: true },
  },
  [`${STUDY}/members`]: {
    get: { summary: 'Members, pending ones too', query: ListQuery, answer: MemberList },
    post: {
      summary: 'Add by address; an unknown address waits for an invitation',
      body: MemberInput,
      answer: StudyMember,
      status: 201,
    },
  },
  [`${STUDY}/members/{memberId}`]: {
    patch: { summary: 'Change a role', body: MemberPatch, answer: StudyMember, versioned: true },
    delete: { summary: 'Take out a member; anyone may leave', status: 204, versioned: true },
  },
  [`${STUDY}/orbits`]: {
    get: { summary: 'The launch manifest', query: ListQuery, answer: OrbitList },
    post: { summary: 'Add a target orbit', body: OrbitInput, answer: StudyOrbit, status: 201 },
  },
  [`${STUDY}/orbits/{orbitId}`]: {
    get: { summary: 'A target orbit', answer: StudyOrbit },
    patch: { summary: 'Change a target orbit', body: OrbitPatch, answer: StudyOrbit, versioned: true },
    delete: { summary: 'Remove a target orbit', answer: Saved, versioned: true },
  },
  [`${STUDY}/vehicle`]: {
    get: { summary: 'The vehicle', answer: StudyVehicle },
    put: {
      summary: 'Set the vehicle, from the library or entered',
      body: StudyVehicleInput,
      answer: StudyVehicle,
      versioned: true,
    },
    delete: { summary: 'Go without a vehicle', answer: StudyVehicle, versioned: true },
  },
  [`${STUDY}/settings`]: {
    get: { summary: 'The settings', answer: StudySettings },
    patch: { summary: 'Change settings', body: SettingsPatch, answer: StudySettings, versioned: true },
  },
  [`${STUDY}/evaluation`]: {
    get: { summary: 'Every site for every target orbit', answer: StudyEvaluation },
  },
  [`${STUDY}/evaluation/inputs`]: {
    get: { summary: 'Everything the evaluation follows from', answer: StudyInputs },
  },
  [`${STUDY}/criteria`]: {
    get: { summary: 'Criteria', query: ListQuery, answer: CriterionList },
    post: { summary: 'Add a criterion', body: CriterionInput, answer: Criterion, status: 201 },
  },
  [`${STUDY}/criteria/{criterionId}`]: {
    get: { summary: 'A criterion', answer: Criterion },
    patch: { summary: 'Change a criterion', body: CriterionPatch, answer: Criterion, versioned: true },
    delete: { summary: 'Remove a criterion', status: 204, versioned: true },
  },
  [`${STUDY}/criterion-groups`]: {
    get: { summary: 'Groups of criteria', query: ListQuery, answer: CriterionGroupList },
    post: {
      summary: 'Make a group of criteria',
      body: CriterionGroupInput,
      answer: CriterionGroup,
      status: 201,
    },
  },
  [`${STUDY}/criterion-groups/{groupId}`]: {
    patch: {
      summary: 'Rename a group',
      body: CriterionGroupPatch,
      answer: CriterionGroup,
      versioned: true,
    },
    delete: {
      summary: 'Remove a group; its criteria stay, in no group',
      status: 204,
      versioned: true,
    },
  },
  [`${STUDY}/weights`]: {
    get: { summary: 'Weights: the study’s or your own', query: WeightsQuery, answer: Weights },
    put: {
      summary: 'Set weights; the study’s are a lead’s to set',
      query: WeightsQuery,
      body: WeightsInput,
      answer: Weights,
      versioned: true,
    },
  },
  [`${STUDY}/weights/members`]: {
    get: {
      summary: 'Who may weigh, and the sets they share; your own always',
      answer: MemberWeightsList,
    },
  },
  [`${STUDY}/weights/choice`]: {
    post: {
      summary: 'Take the study’s weights from a member’s shared set, or from the mean of all',
      body: WeightsChoice,
      answer: Weights,
      versioned: true,
    },
  },
  [`${STUDY}/ranking`]: {
    get: { summary: 'Ranked, set-aside and incomplete sites', query: RankingQuery, answer: Ranking },
  },
  [`${STUDY}/memo.pdf`]: {
    get: {
      summary: 'The draft trade memo',
      query: MemoQuery,
      answer: { type: 'application/pdf', description: 'The memo' },
    },
  },
  [`${STUDY}/memo-inputs.json`]: {
    get: {
      summary: 'The inputs whose checksum a memo prints, as canonical JSON',
      answer: { type: 'application/json', description: 'The very bytes that the SHA-256 is taken of' },
    },
  },
  [`${STUDY}/sections`]: {
    get: { summary: 'The sections, each with its line of fact', answer: StudySections },
  },
  [`${STUDY}/events`]: { get: { summary: 'Changes of this study, as they happen', answer: EVENTS } },
  '/api/v1/events': { get: { summary: 'Changes of all your studies, as they happen', answer: EVENTS } },
};
