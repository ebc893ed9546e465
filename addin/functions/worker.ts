/** Entry of the Worker: answers one task after another. */
import type { Task } from './background';
import { replyOf } from './reply';

addEventListener('message', ({ data }: MessageEvent<Task>) => {
  postMessage(replyOf(data.name, data.args));
});
