import { type NonNullableFormBuilder } from '@angular/forms';
import { type RequirementForm } from './requirement-fields';
import { type RequirementText } from './requirement-text';

/** A form over the texts of a requirement. */
export function formOf(builder: NonNullableFormBuilder, text: RequirementText): RequirementForm {
  return builder.group({ ...text });
}
