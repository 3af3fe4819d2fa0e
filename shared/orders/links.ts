/** Where the browser's pages are; mail and notices link to them, opening one acts on nothing. */
export const draftLink = (versionId: string): string => `/drafts/${versionId}`;
export const orderLink = (versionId: string): string => `/orders/${versionId}`;
export const checkLink = (versionId: string): string => `/checks/${versionId}`;
export const exceptionLink = (versionId: string): string => `/exceptions/${versionId}`;
