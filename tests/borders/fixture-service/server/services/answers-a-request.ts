// Must be refused: services know neither requests nor mail senders.
import type { Request } from 'express';
import nodemailer from 'nodemailer';
import { sendLetter } from '../mail/send-letter.ts';

export const seen = (request: Request) => [request, nodemailer, sendLetter];
