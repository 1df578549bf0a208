/** Who does something: the name that goes into `created_by` and the audit log, and the person's id where it is one. */
export interface Actor {
  name: string;
  id?: string;
}

/** The person at this machine: who the command line and the server itself act for. */
export const localActor: Actor = { name: 'local' };
