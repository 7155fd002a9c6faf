import type { PluginDef } from '@fullcalendar/core';
import interaction from '@fullcalendar/interaction';

/**
 * The library's dragging, from where the pointer takes hold. By itself it goes on from the middle of the bar within the
 * slot: taken near an end, a bar would jump by up to half a slot before it has moved at all.
 */
export const exactDrag: PluginDef = {
  ...interaction,
  componentInteractions: interaction.componentInteractions.map(
    (Usual) =>
      class extends Usual {
        constructor(settings: ConstructorParameters<typeof Usual>[0]) {
          super({ ...settings, useEventCenter: false });
        }
      },
  ),
};
