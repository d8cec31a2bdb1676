import { Account, AccountPatch, Acceptance, MadeKey, PersonalKeyInput, PersonalKeyList } from '../account.ts';
import {
  Invitation,
  InvitationInput,
  InvitationList,
  LeaderlessList,
  LibraryVehicleInput,
  LibraryVehiclePatch,
  NewLead,
  Outbox,
  Person,
  PersonList,
  PersonPatch,
} from '../admin.ts';
import { ListQuery } from '../list.ts';
import { LibraryVehicle, LibraryVehicleList } from '../requirement.ts';
import type { Operations } from './operation.ts';

export const peopleOperations: Operations = {
  '/api/v1/account': {
    get: { summary: 'Your account', answer: Account },
    patch: { summary: 'Change your name', body: AccountPatch, answer: Account, versioned: true },
  },
  '/api/v1/account/keys': {
    get: { summary: 'Your personal keys', answer: PersonalKeyList },
    post: {
      summary: 'Make a key; it is shown this once',
      body: PersonalKeyInput,
      answer: MadeKey,
      status: 201,
    },
  },
  '/api/v1/account/keys/{keyId}': { delete: { summary: 'Withdraw a key', status: 204 } },
  '/api/v1/invitations/{token}': {
    post: { summary: 'Accept an invitation and be signed in', body: Acceptance, status: 204, open: true },
  },
  '/api/v1/admin/people': {
    get: { summary: 'People of the installation', query: ListQuery, answer: PersonList },
  },
  '/api/v1/admin/people/{userId}': {
    patch: {
      summary: 'Deactivate or reactivate a person, or make an administrator',
      body: PersonPatch,
      answer: Person,
      versioned: true,
    },
  },
  '/api/v1/admin/invitations': {
    get: {
      summary: 'Invitations, and addresses that wait for one',
      query: ListQuery,
      answer: InvitationList,
    },
    post: { summary: 'Invite by mail', body: InvitationInput, answer: Invitation, status: 201 },
  },
  '/api/v1/admin/invitations/{invitationId}': { delete: { summary: 'Withdraw an invitation', status: 204 } },
  '/api/v1/admin/leaderless': {
    get: { summary: 'Studies without an active lead', query: ListQuery, answer: LeaderlessList },
    post: { summary: 'Name a lead for one of them', body: NewLead, status: 204 },
  },
  '/api/v1/admin/vehicles': {
    get: { summary: 'The vehicle library, archived ones too', query: ListQuery, answer: LibraryVehicleList },
    post: { summary: 'Add a vehicle', body: LibraryVehicleInput, answer: LibraryVehicle, status: 201 },
  },
  '/api/v1/admin/vehicles/{vehicleId}': {
    get: { summary: 'A vehicle of the library', answer: LibraryVehicle },
    patch: {
      summary: 'Change or archive a vehicle',
      body: LibraryVehiclePatch,
      answer: LibraryVehicle,
      versioned: true,
    },
  },
  '/api/v1/admin/outbox': {
    get: {
      summary: 'Mail sent, and mail kept where there is no mail server',
      query: ListQuery,
      answer: Outbox,
    },
  },
  '/api/v1/vehicles': {
    get: { summary: 'The vehicle library, to choose from', query: ListQuery, answer: LibraryVehicleList },
  },
};
