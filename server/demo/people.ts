import type { NewPerson } from './make-hospital';

/** Everybody in the demo has it; the demo listens on this machine only. */
export const DEMO_PASSWORD = 'saltmarsh';

export const DEMO_HOSPITAL = 'Saltmarsh Children’s Hospital';
export const DEMO_ZONE = 'Europe/London';
export const DEMO_WARDS = ['Heron', 'Curlew', 'Plover', 'Wren'] as const;
export type DemoWard = (typeof DEMO_WARDS)[number];

type DemoPerson = NewPerson & { role: string };

const person = (
  name: string,
  title: string,
  role: string,
  rest: Pick<DemoPerson, 'roles' | 'entitlements'> & Partial<DemoPerson>,
): DemoPerson => ({
  name: rest.roles.includes('prescriber') ? `Dr ${name}` : name,
  email: `${name.toLowerCase().replaceAll(/[^a-z]+/g, '.')}@saltmarsh.example`,
  title,
  role,
  at: DEMO_WARDS,
  registrationNumber: null,
  ...rest,
});

/** Invented people, in the order in which the start program lists them. */
export const DEMO_PEOPLE = {
  junior: person('Idris Fontaine-Bell', 'Foundation doctor', 'prescriber, junior', {
    roles: ['prescriber'],
    entitlements: [],
    registrationNumber: 'SM-D 30417',
  }),
  officer: person('Maren Quillfeather', 'Senior house officer', 'prescriber, checker', {
    roles: ['prescriber'],
    entitlements: ['checking'],
    registrationNumber: 'SM-D 28859',
  }),
  registrar: person('Noor Castellane', 'Registrar', 'prescriber, senior, checker', {
    roles: ['prescriber'],
    entitlements: ['checking', 'senior'],
    registrationNumber: 'SM-D 21206',
  }),
  consultant: person('Sunniva Achterbury', 'Consultant', 'consultant, ward lead, senior', {
    roles: ['prescriber', 'lead'],
    entitlements: ['checking', 'senior'],
    registrationNumber: 'SM-D 10733',
  }),
  pharmacist: person('Petra Halloway-Nnadi', 'Ward pharmacist', 'pharmacist', {
    roles: ['pharmacist'],
    entitlements: [],
    registrationNumber: 'SM-P 4471',
  }),
  nurse: person('Orla Finchley-Adu', 'Staff nurse', 'nurse, checker', {
    roles: ['nurse'],
    entitlements: ['checking', 'witness'],
    registrationNumber: 'SM-N 77120',
  }),
  otherNurse: person('Samir Lundgrave', 'Staff nurse', 'nurse, checker', {
    roles: ['nurse'],
    entitlements: ['checking', 'witness'],
    registrationNumber: 'SM-N 77984',
  }),
  seniorNurse: person('Bronagh Tillerman', 'Charge nurse', 'senior nurse, checker, witness', {
    roles: ['nurse'],
    entitlements: ['checking', 'senior', 'witness'],
    registrationNumber: 'SM-N 60312',
  }),
  agency: person('Jory Pascombe', 'Agency nurse', 'nurse without registration number', {
    roles: ['nurse'],
    entitlements: [],
    at: ['Heron'],
  }),
  admin: person('Wilma Strandling', 'Administrator', 'administrator', {
    roles: ['administrator'],
    entitlements: [],
    at: [],
  }),
} satisfies Record<string, DemoPerson>;

export type DemoPersonKey = keyof typeof DEMO_PEOPLE;

/** What the start program prints. */
export const demoSignIns: { email: string; password: string; name: string; role: string }[] = Object.values(
  DEMO_PEOPLE,
).map(({ email, name, role }) => ({ email, password: DEMO_PASSWORD, name, role }));
