import type { NewPerson } from '../../server/demo/make-hospital';

type Cast = Omit<NewPerson, 'email'>;

const BOTH = ['Heron', 'Curlew'];

const one = (name: string, title: string, rest: Partial<Cast> & Pick<Cast, 'roles'>): Cast => ({
  name,
  title,
  entitlements: [],
  at: BOTH,
  registrationNumber: `REG ${name.length}${name.charCodeAt(0)}${name.charCodeAt(2)}`,
  ...rest,
});

/** Invented people of a story's hospital. */
export const CAST = {
  doctor: one('Imogen Valehart', 'Senior house officer', { roles: ['prescriber'] }),
  checker: one('Tobias Rennick', 'Registrar', { roles: ['prescriber'], entitlements: ['checking'] }),
  otherChecker: one('Maud Ferrierson', 'Registrar', { roles: ['prescriber'], entitlements: ['checking'] }),
  senior: one('Halina Brandthorpe', 'Registrar', {
    roles: ['prescriber'],
    entitlements: ['checking', 'senior'],
  }),
  consultant: one('Ottoline Pascoe-Reeve', 'Consultant', {
    roles: ['prescriber', 'lead'],
    entitlements: ['checking', 'senior'],
  }),
  nurse: one('Orla Finchampton', 'Staff nurse', { roles: ['nurse'], entitlements: ['witness'] }),
  checkingNurse: one('Samir Lundquay', 'Charge nurse', {
    roles: ['nurse'],
    entitlements: ['checking', 'witness'],
  }),
  pharmacist: one('Beatrix Amadisson', 'Pharmacist', { roles: ['pharmacist'] }),
  admin: one('Wilma Stroudley', 'Administrator', {
    roles: ['administrator'],
    at: [],
    registrationNumber: null,
  }),
} satisfies Record<string, Cast>;

export type CastKey = keyof typeof CAST;
