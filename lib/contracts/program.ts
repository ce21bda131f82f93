import { z } from 'zod';
import { codeSchema, titleSchema } from './codes';
import { chiefSchema } from './people';

export const newProgramSchema = z.object({ code: codeSchema, title: titleSchema, ...chiefSchema });
