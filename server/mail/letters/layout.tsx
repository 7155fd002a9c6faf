/** @jsxRuntime automatic */
import { Body, Button, Container, Head, Heading, Hr, Html, Preview, Section, Text } from '@react-email/components';
import { render, toPlainText } from '@react-email/render';
import type { ReactNode } from 'react';
import type { Letter } from '../mailer.ts';

/** The product's light colours: letters stay light, since many readers' dark modes repaint what they do not know. */
export const colour = {
  paper: '#f5f1ea',
  surface: '#fffdf9',
  line: '#ddd5c8',
  ink: '#1b2422',
  muted: '#5d6763',
  ember: '#bf4410',
};
const fonts = 'Manrope, "Segoe UI", Helvetica, Arial, sans-serif';

export const paragraph = { color: colour.ink, fontSize: '16px', lineHeight: '24px', margin: '0 0 16px' };
export const small = { color: colour.muted, fontSize: '13px', lineHeight: '20px', margin: '0 0 8px' };

/** The arch of the oven, drawn by a border: pictures are often not shown. */
const arch = {
  display: 'inline-block',
  width: '12px',
  height: '14px',
  border: `4px solid ${colour.ember}`,
  borderBottom: '0',
  borderRadius: '10px 10px 0 0',
  verticalAlign: '-3px',
  marginRight: '8px',
};

type Action = { label: string; href: string };
type Sheet = { preview: string; title: string; action?: Action; children: ReactNode; why: string };

function Paper({ preview, title, action, children, why }: Sheet) {
  return (
    <Html lang="en">
      <Head>
        <meta name="color-scheme" content="light" />
        <meta name="supported-color-schemes" content="light" />
      </Head>
      <Preview>{preview}</Preview>
      <Body style={{ backgroundColor: colour.paper, fontFamily: fonts, margin: '0', padding: '24px 12px' }}>
        <Container style={{ maxWidth: '560px', margin: '0 auto' }}>
          <Section style={{ padding: '0 4px 12px' }}>
            <Text style={{ ...paragraph, fontWeight: 700, margin: '0' }}>
              <span style={arch} />
              Ovenbird
            </Text>
          </Section>
          <Section
            style={{
              backgroundColor: colour.surface,
              border: `1px solid ${colour.line}`,
              borderRadius: '6px',
              padding: '24px',
            }}
          >
            <Heading as="h1" style={{ color: colour.ink, fontSize: '22px', lineHeight: '28px', margin: '0 0 16px' }}>
              {title}
            </Heading>
            {children}
            {action && (
              <Button
                href={action.href}
                style={{
                  backgroundColor: colour.ember,
                  borderRadius: '6px',
                  color: '#ffffff',
                  fontSize: '16px',
                  fontWeight: 600,
                  padding: '12px 20px',
                  textDecoration: 'none',
                }}
              >
                {action.label}
              </Button>
            )}
          </Section>
          <Hr style={{ borderColor: colour.line, margin: '20px 0 12px' }} />
          <Text style={small}>{why}</Text>
        </Container>
      </Body>
    </Html>
  );
}

/** A letter in the product's look, as HTML and as plain text of the same words. */
export async function write(subject: string, sheet: Sheet): Promise<Letter> {
  const html = await render(<Paper {...sheet} />);
  return { subject, html, text: toPlainText(html) };
}
