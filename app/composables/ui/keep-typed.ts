import type { ObjectDirective, Ref } from 'vue'

/**
 * What was typed before the page came alive is kept: on a slow line people type into what the server drew,
 * and a field that comes alive with nothing would wipe it.
 */
export function keepTyped(value: Ref<string>): ObjectDirective<HTMLInputElement | HTMLTextAreaElement> {
  return {
    created(field) {
      if (field.value !== '' && field.value !== value.value) value.value = field.value
    },
  }
}
