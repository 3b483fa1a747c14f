/** What a thread of the service's pool runs. */
export {};
