/**
 * Addresses of the API, in one place for client, server and tests. Every path but those marked public
 * needs a bearer token; the permission each one asks for stands beside it.
 */
import type { Side } from './common';

const eye = (patientId: string, side: Side) => `/api/patients/${patientId}/eyes/${side}`;

export const paths = {
  // public
  practice: () => '/api/practice', // GET
  setup: () => '/api/setup', // POST first administrator
  signIn: () => '/api/auth/sign-in', // POST
  refresh: () => '/api/auth/refresh', // POST, cookie
  signOut: () => '/api/auth/sign-out', // POST, cookie
  passwordReset: () => '/api/auth/password-reset', // POST
  passwordLink: (token: string) => `/api/auth/links/${token}`, // GET, POST
  // any signed-in person
  me: () => '/api/auth/me', // GET
  home: () => '/api/home', // GET
  // account.manage
  accounts: () => '/api/accounts', // GET, POST (invite)
  account: (id: string) => `/api/accounts/${id}`, // PUT
  accountInvitation: (id: string) => `/api/accounts/${id}/invitation`, // POST (send again)
  outbox: () => '/api/outbox', // GET
  // audit.read
  audit: () => '/api/audit', // GET
  // patient.read, patient.write
  patients: () => '/api/patients', // GET ?search&after&limit, POST
  patient: (id: string) => `/api/patients/${id}`, // GET, PUT
  eye, // GET eye desk (patient.read)
  eyeHistory: (patientId: string, side: Side) => `${eye(patientId, side)}/history`, // PUT (patient.write)
  eyeMeasurements: (patientId: string, side: Side) => `${eye(patientId, side)}/measurements`, // POST (measurement.write)
  eyeSettlements: (patientId: string, side: Side) => `${eye(patientId, side)}/settlements`, // POST (flag.settle)
  measurement: (id: string) => `/api/measurements/${id}`, // GET (patient.read)
  // measurement.write (reading also import.read)
  imports: () => '/api/imports', // GET, POST multipart `file`
  import: (id: string) => `/api/imports/${id}`, // GET
  importRows: (id: string) => `/api/imports/${id}/rows`, // GET ?outcome&after&limit
  importFile: (id: string) => `/api/imports/${id}/file`, // GET, bytes
  importConfirm: (id: string) => `/api/imports/${id}/confirm`, // POST
  importDiscard: (id: string) => `/api/imports/${id}/discard`, // POST
  importTemplate: () => '/api/imports/template.csv', // GET, bytes
  importDemoFile: () => '/api/imports/demo.csv', // GET, bytes; only in the demo
  // lens.read, lens.write
  lenses: () => '/api/lenses', // GET, POST
  lens: (id: string) => `/api/lenses/${id}`, // GET, PUT
  lensImport: () => '/api/lenses/import', // POST multipart `file`, ?dryRun=1
  lensTemplate: () => '/api/lenses/template.csv', // GET
  // plan.read, plan.write, plan.sign
  plans: () => '/api/plans', // GET ?status&search&after&limit
  eyePlans: (patientId: string, side: Side) => `${eye(patientId, side)}/plans`, // POST (plan.write): new draft
  plan: (id: string) => `/api/plans/${id}`, // GET plan desk, PUT change of the draft (plan.write)
  planSign: (id: string) => `/api/plans/${id}/sign`, // POST (plan.sign)
  planDiscard: (id: string) => `/api/plans/${id}/discard`, // POST (plan.write)
  planSheet: (id: string) => `/api/plans/${id}/sheet.pdf`, // GET ?paper=a4|letter (plan.read)
  openApi: () => '/api/openapi.json', // public
} as const;
