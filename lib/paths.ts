/** Every address the program makes. Arguments are put in percent-encoded. */
const part = (value: string | number): string => encodeURIComponent(String(value));

export const paths = {
  home: (company: string) => `/${part(company)}`,
  signIn: (company: string) => `/${part(company)}/sign-in`,
  invitation: (company: string, token: string) => `/${part(company)}/invitation/${part(token)}`,

  job: (company: string, job: string) => `/${part(company)}/jobs/${part(job)}`,
  choose: (company: string, job: string) => `/${part(company)}/jobs/${part(job)}/choose`,
  review: (company: string, job: string) => `/${part(company)}/jobs/${part(job)}/review`,
  book: (company: string, job: string) => `/${part(company)}/jobs/${part(job)}/book`,
  bookPage: (company: string, job: string, sequence: number) =>
    `/${part(company)}/jobs/${part(job)}/book/${part(sequence)}`,
  payments: (company: string, job: string) => `/${part(company)}/jobs/${part(job)}/payments`,
  payment: (company: string, job: string, draw: string) =>
    `/${part(company)}/jobs/${part(job)}/payments/${part(draw)}`,
  changeOrders: (company: string, job: string) => `/${part(company)}/jobs/${part(job)}/changes`,
  changeOrder: (company: string, job: string, order: string) =>
    `/${part(company)}/jobs/${part(job)}/changes/${part(order)}`,

  desk: (company: string) => `/${part(company)}/desk`,
  deskJobs: (company: string) => `/${part(company)}/desk/jobs`,
  deskJob: (company: string, job: string) => `/${part(company)}/desk/jobs/${part(job)}`,
  deskRoom: (company: string, job: string) => `/${part(company)}/desk/jobs/${part(job)}/room`,
  doorOrder: (company: string, job: string) => `/${part(company)}/desk/jobs/${part(job)}/door-order`,
  approvals: (company: string) => `/${part(company)}/desk/approvals`,

  api: {
    jobs: (company: string) => `/api/${part(company)}/jobs`,
    job: (company: string, job: string) => `/api/${part(company)}/jobs/${part(job)}`,
    schemes: (company: string, job: string) => `/api/${part(company)}/jobs/${part(job)}/schemes`,
    scheme: (company: string, job: string, scheme: string) =>
      `/api/${part(company)}/jobs/${part(job)}/schemes/${part(scheme)}`,
    offers: (company: string, job: string) => `/api/${part(company)}/jobs/${part(job)}/offers`,
    offer: (company: string, job: string, offer: string) =>
      `/api/${part(company)}/jobs/${part(job)}/offers/${part(offer)}`,
    signatures: (company: string, job: string, offer: string) =>
      `/api/${part(company)}/jobs/${part(job)}/offers/${part(offer)}/signatures`,
    book: (company: string, job: string) => `/api/${part(company)}/jobs/${part(job)}/book`,
    draws: (company: string, job: string) => `/api/${part(company)}/jobs/${part(job)}/draws`,
    drawPayment: (company: string, job: string, draw: string) =>
      `/api/${part(company)}/jobs/${part(job)}/draws/${part(draw)}/payment`,
    changeOrders: (company: string, job: string) => `/api/${part(company)}/jobs/${part(job)}/change-orders`,
    changeOrder: (company: string, job: string, order: string) =>
      `/api/${part(company)}/jobs/${part(job)}/change-orders/${part(order)}`,
    changeOrderDecision: (company: string, job: string, order: string) =>
      `/api/${part(company)}/jobs/${part(job)}/change-orders/${part(order)}/decision`,
    invitations: (company: string, job: string) => `/api/${part(company)}/jobs/${part(job)}/invitations`,
    invitation: (company: string, job: string, invitation: string) =>
      `/api/${part(company)}/jobs/${part(job)}/invitations/${part(invitation)}`,
    invitationAcceptance: (company: string, token: string) =>
      `/api/${part(company)}/invitations/${part(token)}/acceptance`,
    doorOrder: (company: string, job: string) => `/api/${part(company)}/jobs/${part(job)}/door-order`,
    approvals: (company: string) => `/api/${part(company)}/approvals`,
    clerkWebhook: () => '/api/webhooks/clerk',
    stripeWebhook: () => '/api/webhooks/stripe',
  },
} as const;
