/** The id of the input of a field, as error summaries link to it; `field` is its path on the wire. */
export const fieldId = (field: string): string => `field-${field.replace(/[^\w-]/g, '-')}`
