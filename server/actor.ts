/** Who does something: the name that goes into `created_by` and the audit log. */
export interface Actor {
  name: string;
}

/** The person at this machine: who the command line, the demo and a server without sign-in act for. */
export const localActor: Actor = { name: 'local' };
